/** What each abbreviation on our sheets stands for. */
const MEANINGS: Readonly<Record<string, string>> = {
	'evap.': 'evaporator',
	'cond.': 'condenser',
	'sat.': 'saturation temperature',
	'diff.': 'a difference of temperatures: a difference of 5 K is one of 9 °F'
};
const KNOWN = /\b(evap\.|cond\.|sat\.|diff\.)/gi;

/** A text in parts: plain ones, and abbreviations with what they mean. */
export function splitAbbreviations(text: string): { text: string; means: string | null }[] {
	return text
		.split(KNOWN)
		.filter((part) => part !== '')
		.map((part) => ({ text: part, means: MEANINGS[part.toLowerCase()] ?? null }));
}
