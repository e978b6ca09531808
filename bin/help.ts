import type { CommandSpec } from "./arguments.ts";

/** Help of one command. yargs lays it out; it is loaded only here, since it costs most of a start. */
export async function commandHelp(spec: CommandSpec): Promise<string> {
  const { default: yargs } = await import("yargs");
  const y = yargs([])
    .scriptName("sitefold")
    .usage(`sitefold ${spec.name} ${spec.operands}\n\n${spec.summary}`)
    .help(false)
    .version(false)
    .wrap(100);
  for (const [name, option] of Object.entries(spec.options)) {
    y.option(name, {
      describe: option.describe,
      type: option.type === "boolean" ? "boolean" : "string",
      ...(option.alias ? { alias: option.alias } : {}),
    });
  }
  const indented = spec.example.output
    .replace(/^\n|\s+$/g, "")
    .split("\n")
    .map((line) => `  ${line}`.trimEnd())
    .join("\n");
  return `${nameValues(await y.getHelp(), spec)}\n\nExample:\n  $ ${spec.example.line}\n${indented}`;
}

/** Puts what an option takes, `[ANGSTROM]`, where yargs tells its type, which is no help. */
function nameValues(help: string, spec: CommandSpec): string {
  let value = "";
  const lines = help.split("\n").map((line) => {
    const name = /^ {2,}(?:-\w, )?--?([a-z-]+)/.exec(line)?.[1];
    if (name !== undefined) value = spec.options[name]?.value ?? "";
    return line.replace(/ *\[string\]$/, (type) => (value === "" ? type : ` [${value}]`.padStart(type.length)));
  });
  return lines.join("\n");
}

/** The list of commands. */
export function overview(
  commands: readonly { readonly name: string; readonly summary: string }[],
  version: string,
): string {
  const width = Math.max(...commands.map((c) => c.name.length));
  const lines = commands.map((c) => `  ${c.name.padEnd(width)}  ${c.summary}`);
  return [
    `sitefold ${version}: symmetry answers from a CIF file`,
    "",
    "  sitefold COMMAND FILE [options]      FILE may be - for standard input",
    "  sitefold COMMAND --help              options and an example",
    "",
    ...lines,
    "",
    "Exit status: 0 done, 1 answered with a contradiction, 2 bad usage, 3 input could not be read, 4 defect of sitefold.",
  ].join("\n");
}
