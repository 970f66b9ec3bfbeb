/** A beginning that a spreadsheet may take for a formula; full-width signs count in some of them. */
const FORMULA_START = /^(?:[\t\r\n\0]|\s*[=+\-@＝＋－＠])/;

/**
 * A text for one cell of a CSV file that no spreadsheet takes for a formula: a single quote goes before
 * it where needed. Source: OWASP ASVS 5.0.0, 1.2.10, and its characters in full-width form.
 */
export function guardCell(text: string): string {
  return FORMULA_START.test(text) ? `'${text}` : text;
}

/** The text as it was before `guardCell`. */
export function unguardCell(text: string): string {
  return text.startsWith("'") && FORMULA_START.test(text.slice(1)) ? text.slice(1) : text;
}
