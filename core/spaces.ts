/**
 * Between a value and its unit, and about a ±: does not break, and can be seen. (The thin spaces of the faces that the application ships are
 * a tenth of an em, which runs a value and its unit together.)
 */
export const GAP = '\u00a0'
