/** Month and weekday names that exports print, by their first letters, and the zones' abbreviations. */

const MONTH_FORMS: readonly (readonly string[])[] = [
	['jan', 'january', 'januar', 'janv', 'janvier', 'enero', 'ene', 'gennaio', 'gen'],
	['feb', 'february', 'februar', 'fev', 'fevr', 'fevrier', 'febrero', 'febbraio'],
	['mar', 'march', 'marz', 'mrz', 'maerz', 'mars', 'marzo'],
	['apr', 'april', 'avr', 'avril', 'abr', 'abril', 'aprile'],
	['may', 'mai', 'mayo', 'maggio', 'mag'],
	['jun', 'june', 'juni', 'juin', 'junio', 'giugno', 'giu'],
	['jul', 'july', 'juli', 'juil', 'juillet', 'julio', 'luglio', 'lug'],
	['aug', 'august', 'aout', 'ago', 'agosto'],
	['sep', 'sept', 'september', 'septembre', 'septiembre', 'settembre', 'set'],
	['oct', 'october', 'okt', 'oktober', 'octobre', 'octubre', 'ottobre', 'ott'],
	['nov', 'november', 'novembre', 'noviembre'],
	['dec', 'december', 'dez', 'dezember', 'decembre', 'dic', 'diciembre', 'dicembre']
];
const MONTHS = new Map(MONTH_FORMS.flatMap((names, i) => names.map((name) => [name, i + 1] as const)));

const WEEKDAYS = new Set(
	(
		'mon monday tue tues tuesday wed wednesday thu thur thurs thursday fri friday sat saturday sun sunday ' +
		'mo di mi do fr sa so lun mer jeu ven sam dim'
	).split(' ')
);

/**
 * Minutes east of UTC of the abbreviations trend exports print. Some name two zones (CST, IST, BST):
 * these are the readings of North America, Europe and Australia, kept only while the site's own zone does not disagree.
 */
const ABBREVIATIONS: Readonly<Record<string, number>> = {
	UTC: 0,
	GMT: 0,
	Z: 0,
	WET: 0,
	BST: 60,
	WEST: 60,
	IST: 60,
	CET: 60,
	MEZ: 60,
	CEST: 120,
	MESZ: 120,
	EET: 120,
	EEST: 180,
	MSK: 180,
	AST: -240,
	ADT: -180,
	NST: -210,
	NDT: -150,
	EST: -300,
	EDT: -240,
	CST: -360,
	CDT: -300,
	MST: -420,
	MDT: -360,
	PST: -480,
	PDT: -420,
	AKST: -540,
	AKDT: -480,
	HST: -600,
	AWST: 480,
	ACST: 570,
	ACDT: 630,
	AEST: 600,
	AEDT: 660,
	NZST: 720,
	NZDT: 780,
	SGT: 480,
	HKT: 480,
	JST: 540,
	KST: 540,
	SAST: 120
};

/** Month 1…12 of a name or abbreviation in lower case without accents, or 0. */
export function monthOf(word: string): number {
	return MONTHS.get(word) ?? 0;
}

/** Is the word a weekday's name? Weekdays in stamps say nothing and are passed over. */
export function isWeekday(word: string): boolean {
	return WEEKDAYS.has(word);
}

/** Minutes east of UTC of a zone abbreviation in any case, or NaN. */
export function abbreviationOffset(word: string): number {
	return ABBREVIATIONS[word.toUpperCase()] ?? NaN;
}
