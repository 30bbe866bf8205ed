import { atPoint, type Column, groups, type TableModel } from "./model.js";

const specials: Record<string, string> = {
  "\\": "\\textbackslash{}",
  "{": "\\{",
  "}": "\\}",
  $: "\\$",
  "&": "\\&",
  "#": "\\#",
  "%": "\\%",
  _: "\\_",
  "~": "\\textasciitilde{}",
  "^": "\\textasciicircum{}",
  "<": "$<$",
  ">": "$>$",
  "|": "\\textbar{}",
  '"': "\\textquotedbl{}",
  "−": "$-$",
  "×": "$\\times$",
  "∞": "$\\infty$",
  χ: "$\\chi$",
  ρ: "$\\rho$",
  σ: "$\\sigma$",
  β: "$\\beta$",
  π: "$\\pi$",
  Δ: "$\\Delta$",
  "≤": "$\\le$",
  "≥": "$\\ge$",
  "·": "$\\cdot$",
  "√": "$\\surd$",
  "…": "\\ldots{}",
  "–": "--",
};

/** A text with everything that means something to LaTeX made harmless, and our own signs in LaTeX's writing. */
export function escapeLatex(text: string): string {
  return text
    .split(/([⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+|[₀₁₂₃₄₅₆₇₈₉]+)/u)
    .map((piece, i) =>
      i % 2 === 1
        ? `$${subscripts.includes(piece[0]!) ? "_" : "^"}{${lowered(piece)}}$`
        : piece.replace(/[\\{}$&#%_~^<>|"−×∞χρσβπΔ≤≥·√…–]/gu, (c) => specials[c]!),
    )
    .join("");
}

const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹⁻";
const subscripts = "₀₁₂₃₄₅₆₇₈₉";

function lowered(run: string): string {
  const written = subscripts.includes(run[0]!) ? subscripts : superscripts;
  return [...run].map((c) => "0123456789-"[[...written].indexOf(c)]).join("");
}

/**
 * A table as a LaTeX `tabular`, with no package needed: figures are lined up at their decimal point by a column before
 * and one after it. The title stands above as a comment, ready for `\caption`.
 */
export function latexTable(table: TableModel): string {
  const decimal = (column: Column) => column.align === "decimal";
  const layout = table.columns
    .map((c) => (decimal(c) ? "r@{}l" : (c.align ?? "left") === "left" ? "l" : "r"))
    .join("");
  const span = (columns: readonly Column[]) =>
    columns.reduce((n, column) => n + (decimal(column) ? 2 : 1), 0);
  const grouped = groups(table.columns);
  const over = grouped.map((run) => head(run.title ?? run.columns[0]!.title, span(run.columns), run.columns));
  const under = table.columns.map((c) => head(c.group === undefined ? "" : c.title, span([c]), [c]));
  const rows = table.rows.map((row) =>
    row.map((cell, j) => {
      if (!decimal(table.columns[j]!)) return escapeLatex(cell.text);
      const [before, after] = atPoint(cell.text);
      return `${escapeLatex(before)} & ${escapeLatex(after)}`;
    }),
  );
  const second = table.columns.some((c) => c.group !== undefined && c.title !== "");
  const lines = [
    `% ${table.title.replace(/[\r\n]+/g, " ")}`,
    `\\begin{tabular}{${layout}}`,
    "\\hline",
    `${over.join(" & ")} \\\\`,
    ...(second ? [`${under.join(" & ")} \\\\`] : []),
    "\\hline",
    ...rows.map((row) => `${row.join(" & ")} \\\\`),
    "\\hline",
    "\\end{tabular}",
  ];
  return `${lines.join("\n")}\n`;
}

function head(title: string, columns: number, of: readonly Column[]): string {
  const text = escapeLatex(title);
  if (columns === 1) return text;
  return `\\multicolumn{${columns}}{${(of[0]!.align ?? "left") === "left" ? "l" : "c"}}{${text}}`;
}
