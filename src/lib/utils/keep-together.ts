const UNIT = 's|min|h|d|K|A|kW|psi|psig|kPa|gpm|tons|°F|°C|%|L/s';
const FIGURE = new RegExp(String.raw`(\d) (?=(?:${UNIT})(?![\p{L}/]))`, 'gu');

/**
 * Ties each figure to its unit with a space that does not break, so that a heading never ends a line in "105" and begins
 * the next in "s".
 */
export function keepTogether(text: string): string {
	return text.replace(FIGURE, '$1\u00a0');
}
