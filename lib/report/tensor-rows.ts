/** Tensors of the partners of a species side by side, three rows each, the heading at the middle row. */
export function tensorRows(heading: string, partners: readonly (readonly (readonly string[])[])[]): string {
  const blocks = partners.map((rows) => {
    const width = Math.max(...rows.flat().map((e) => e.length));
    return rows.map((row) => `[ ${row.map((e) => e.padStart(width)).join("  ")} ]`);
  });
  const lines = [0, 1, 2].map((i) => blocks.map((b) => b[i]!).join("   "));
  return lines.map((line, i) => `${(i === 1 ? heading : "").padEnd(16)}${line}`).join("\n");
}
