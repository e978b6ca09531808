import type { InputProblem } from "../lib/problem.ts";
import type { CommandSpec } from "./arguments.ts";
import { UsageProblem } from "./problems.ts";
import { VERSION } from "./version.ts";

interface Command {
  readonly spec: CommandSpec;
  run(words: readonly string[]): Promise<number>;
}

const COMMANDS: Readonly<Record<string, () => Promise<Command>>> = {
  group: () => import("./commands/group.ts"),
  sites: () => import("./commands/sites.ts"),
  positions: () => import("./commands/positions.ts"),
  modes: () => import("./commands/modes.ts"),
  split: () => import("./commands/split.ts"),
  polarise: () => import("./commands/polarise.ts"),
  reduce: () => import("./commands/reduce.ts"),
  symmetrise: () => import("./commands/symmetrise.ts"),
};

async function main(words: readonly string[]): Promise<number> {
  const [name, ...rest] = words;
  if (name === "--version" || name === "-V") return say(VERSION);
  if (name === undefined || name === "help" || name === "--help" || name === "-h") return help(rest[0]);
  const load = Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined;
  if (!load) throw new UsageProblem(`there is no command "${name}"; there are ${Object.keys(COMMANDS).join(", ")}`);
  if (rest.includes("--help") || rest.includes("-h")) return help(name);
  return await (await load()).run(rest);
}

async function help(name: string | undefined): Promise<number> {
  const { commandHelp, overview } = await import("./help.ts");
  if (name !== undefined && Object.hasOwn(COMMANDS, name))
    return say(await commandHelp((await COMMANDS[name]!()).spec));
  const specs = await Promise.all(Object.values(COMMANDS).map(async (load) => (await load()).spec));
  return say(overview(specs, VERSION));
}

function say(text: string): number {
  process.stdout.write(`${text}\n`);
  return 0;
}

/**
 * Status and words for whatever ended a command; a stack is never shown. Commands are bundled apart from this file, so
 * their errors are told by name, not by class.
 */
function conclude(e: unknown): number {
  const { name, message, hint } = e as Partial<InputProblem>;
  switch (name as string | undefined) {
    case "UsageProblem":
      return complain(`sitefold: ${message}\n  sitefold COMMAND --help tells what there is`, 2);
    case "LocatedProblem":
      return complain(String(message), 3);
    case "InputProblem":
      return complain(`${message}${hint ? `\n  ${hint}` : ""}`, 3);
    default:
      return complain(`defect in sitefold ${VERSION}, please report it with the input: ${String(e)}`, 4);
  }
}

function complain(text: string, status: number): number {
  process.stderr.write(`${text}\n`);
  return status;
}

process.stdout.on("error", (e: NodeJS.ErrnoException) => process.exit(e.code === "EPIPE" ? 0 : 3));
main(process.argv.slice(2)).then(
  (status) => {
    process.exitCode = status; // never process.exit: it cuts off piped output
  },
  (e: unknown) => {
    process.exitCode = conclude(e);
  },
);
