import { conclusionOf } from "./conclusion.ts";
import { loadCommand } from "./load-command.ts";
import { UsageProblem } from "./problems.ts";
import { printOut } from "./standard-output.ts";
import { VERSION } from "./version.ts";

/** Each is a file in commands/, bundled apart. */
const COMMANDS: readonly string[] = [
  "group",
  "sites",
  "positions",
  "compose",
  "modes",
  "split",
  "polarise",
  "patterns",
  "point",
  "reduce",
  "symmetrise",
  "neighbours",
  "resite",
  "vet",
  "absences",
];

async function main(words: readonly string[]): Promise<number> {
  const [name, ...rest] = words;
  if (name === "--version" || name === "-V") return say(VERSION);
  if (name === undefined || name === "help" || name === "--help" || name === "-h") return help(rest[0]);
  if (!COMMANDS.includes(name))
    throw new UsageProblem(`there is no command "${name}"; there are ${COMMANDS.join(", ")}`);
  if (rest.includes("--help") || rest.includes("-h")) return help(name);
  return await loadCommand(name).run(rest);
}

async function help(name: string | undefined): Promise<number> {
  const { commandHelp, overview } = await import("./help.ts");
  if (name !== undefined && COMMANDS.includes(name)) return say(await commandHelp(loadCommand(name).spec));
  return say(
    overview(
      COMMANDS.map((c) => loadCommand(c).spec),
      VERSION,
    ),
  );
}

function say(text: string): number {
  printOut(`${text}\n`);
  return 0;
}

main(process.argv.slice(2)).then(
  (status) => {
    process.exitCode = status; // never process.exit: it cuts off piped output
  },
  (e: unknown) => {
    const { text, status } = conclusionOf(e);
    process.stderr.write(`${text}\n`);
    process.exitCode = status;
  },
);
