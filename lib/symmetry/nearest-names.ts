import { settingsOf } from "./settings.ts";

/** The three Hermann-Mauguin symbols nearest to a text, by the number of characters to change; blanks do not count. */
export function nearestNames(text: string): string[] {
  const wanted = text.replace(/[\s_'"()]/g, "").toLowerCase();
  const distances = new Map<string, number>();
  for (let number = 1; number <= 230; number++) {
    for (const { hermannMauguin } of settingsOf(number)) {
      const name = hermannMauguin.short;
      if (!distances.has(name)) distances.set(name, distance(wanted, name.replaceAll(" ", "").toLowerCase()));
    }
  }
  return [...distances]
    .sort(([, d], [, e]) => d - e)
    .slice(0, 3)
    .map(([name]) => name);
}

/** A forgotten bar is the lightest of mistakes. */
function distance(a: string, b: string): number {
  const bars = Math.abs(a.split("-").length - b.split("-").length);
  return editDistance(a.replaceAll("-", ""), b.replaceAll("-", "")) + bars / 4;
}

/** Least number of insertions, deletions and replacements. Source: V. I. Levenshtein, Sov. Phys. Dokl. 10 (1966) 707. */
function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const replaced = row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(replaced, row[j]! + 1, next[j - 1]! + 1));
    }
    row = next;
  }
  return row[b.length]!;
}
