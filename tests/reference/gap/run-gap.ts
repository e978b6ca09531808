import { execFileSync } from "node:child_process";
import { existsSync } from "node:fs";
import { fileURLToPath } from "node:url";

/**
 * Lines that a script of this folder prints, or the reason why there are none.
 * @param setting a statement of GAP that comes before the script
 */
export function runGap(script: string, setting: string): { readonly lines: string[] } | { readonly reason: string } {
  const gap = ["/usr/bin/gap", "/usr/local/bin/gap"].find((path) => existsSync(path));
  if (!gap) return { reason: "GAP is not installed" };
  try {
    const path = fileURLToPath(new URL(script, import.meta.url));
    const args = ["-q", "--nointeract", "-c", setting, path];
    const output = execFileSync(gap, args, { encoding: "utf8", stdio: ["ignore", "pipe", "ignore"] });
    return { lines: output.trim().split("\n") };
  } catch (e) {
    return { reason: `GAP could not run ${script}: ${String(e)}` };
  }
}
