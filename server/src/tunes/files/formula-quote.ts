/**
 * Signs at which a spreadsheet takes a cell for a formula (OWASP, "CSV injection"): tab, line ends, `= + - @`
 * and their full-width forms.
 */
const FORMULA = '[=+\\-@\\t\\r\\n\uFF1D\uFF0B\uFF0D\uFF20]';
const DANGEROUS = new RegExp(`^'*${FORMULA}`);
const QUOTED = new RegExp(`^'+${FORMULA}`);

/** A cell that would be a formula, or would lose a quote of its own, is preceded by `'`. */
export function quoteFormula(cell: string): string {
  return DANGEROUS.test(cell) ? `'${cell}` : cell;
}

/** Undoes `quoteFormula`, whatever the cell: `'Tis` keeps its apostrophe. */
export function unquoteFormula(cell: string): string {
  return QUOTED.test(cell) ? cell.slice(1) : cell;
}
