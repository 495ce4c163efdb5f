/**
 * A text for a cell of a table that a spreadsheet may open. Names come from design files of strangers: a cell that begins with one of = + - @ would be run as a formula,
 * so an apostrophe goes in front (OWASP, "CSV Injection"). Tabs and line breaks, which would make cells or rows of their own, become spaces; other controls are left out.
 */
export function textCell(text: string): string {
  const flat = text.replace(/[\t\r\n\u2028\u2029]+/g, ' ').replace(/[\u0000-\u001f\u007f-\u009f\u202a-\u202e\u2066-\u2069]/g, '');
  return /^\s*[=+\-@\uff1d\uff0b\uff0d\uff20]/.test(flat) ? `'${flat}` : flat;
}

/** A number with all its digits; an empty cell where there is none. */
export function numberCell(value: number | null): string {
  return value === null || !Number.isFinite(value) ? '' : String(value);
}
