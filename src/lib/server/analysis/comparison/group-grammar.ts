import { type FigureKey, FIGURES, type Outcome, OUTCOMES, TRIP_KINDS, type TripKind } from '$lib/model/start';

/**
 * Group expressions: which starts belong to a group, as it stands in the address.
 *
 *   expression = term { "&" term }                         every term must hold
 *   term       = [ "!" ] condition                         "!" turns a condition round
 *   condition  = "all" | "first" | "later" | "weekend" | "working-day" | "attended"
 *              | "rest"  compare length                    rest>=6h, rest<30m  (s, m, h, d)
 *              | "clock" compare "HH:MM"                   clock<11:00         (the site's clock)
 *              | "try"   compare number                    try=1
 *              | figure  compare number [ "F" ]            condWaterIn<12, startCapacity>=55, condWaterIn<54F
 *              | "outcome:" outcome { "," outcome }        outcome:tripped
 *              | "kind:"    trip kind { "," trip kind }
 *              | "before:"  change id | "after:" change id
 *              | "from:" date | "to:" date                 from:2025-06-01     (the site's days, both ends in)
 *              | [ "ids:" ] start id { "," start id }
 *   compare    = "<" | "<=" | "=" | ">=" | ">"
 *
 * Figures are named by their key of the model, in stored units (°C, K, kPa, %, s); condWaterIn, waterOut, oilTemp,
 * oilLift, outdoor and lift stand for the figure at the start. A temperature may be given in °F with a trailing F.
 */
export type Compare = '<' | '<=' | '=' | '>=' | '>';
type Condition =
	| { kind: 'all' | 'first' | 'later' | 'weekend' | 'working-day' | 'attended' }
	| { kind: 'rest'; compare: Compare; seconds: number }
	| { kind: 'clock'; compare: Compare; minutes: number }
	| { kind: 'try'; compare: Compare; number: number }
	| { kind: 'figure'; figure: FigureKey; compare: Compare; value: number }
	| { kind: 'outcome'; outcomes: Outcome[] }
	| { kind: 'trip'; kinds: TripKind[] }
	| { kind: 'before' | 'after'; changeId: string }
	| { kind: 'from' | 'to'; date: string }
	| { kind: 'ids'; ids: string[] };
export type Term = { not: boolean } & Condition;
export type GroupExpression = { text: string; terms: Term[] };

/** An expression that cannot be read: which term, and why. */
export class GroupExpressionError extends RangeError {
	constructor(
		readonly term: string,
		reason: string
	) {
		super(`"${term}" in the group expression: ${reason}`);
		this.name = 'GroupExpressionError';
	}
}

const WORDS = ['all', 'first', 'later', 'weekend', 'working-day', 'attended'] as const;
const SHORT_FIGURES: Readonly<Record<string, FigureKey>> = {
	condWaterIn: 'condWaterInAtStart',
	waterOut: 'waterOutAtStart',
	oilTemp: 'oilTempAtStart',
	oilLift: 'oilLiftAtStart',
	outdoor: 'outdoorAtStart',
	lift: 'liftAtStart'
};
const LENGTHS: Readonly<Record<string, number>> = { s: 1, m: 60, h: 3600, d: 86_400 };

/** Start ids on their own, as an address that lays picked starts side by side has them. */
const BARE_IDS = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}(,[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12})*$/i;

const isFigure = (key: string): key is FigureKey => Object.hasOwn(FIGURES, key);

function members<T extends string>(term: string, list: string, known: readonly T[]): T[] {
	return list.split(',').map((item) => {
		const found = known.find((one) => one === item);
		if (!found) throw new GroupExpressionError(term, `"${item}" is none of ${known.join(', ')}`);
		return found;
	});
}

function compared(term: string, name: string, compare: Compare, value: string): Condition {
	if (name === 'rest') {
		const [, number, unit] = /^(\d+(?:\.\d+)?)([smhd])$/.exec(value) ?? [];
		if (number === undefined || unit === undefined)
			throw new GroupExpressionError(term, 'a rest is a number with s, m, h or d, for example rest>=6h');
		return { kind: 'rest', compare, seconds: Number(number) * (LENGTHS[unit] ?? 1) };
	}
	if (name === 'clock') {
		const [, hours, minutes] = /^([01]?\d|2[0-4]):([0-5]\d)$/.exec(value) ?? [];
		if (hours === undefined || minutes === undefined)
			throw new GroupExpressionError(term, 'a clock is HH:MM, for example clock<11:00');
		return { kind: 'clock', compare, minutes: Number(hours) * 60 + Number(minutes) };
	}
	const [, digits, fahrenheit] = /^([-−]?\d+(?:\.\d+)?)(F?)$/.exec(value) ?? [];
	if (digits === undefined) throw new GroupExpressionError(term, `"${value}" is no number`);
	const number = Number(digits.replace('−', '-'));
	if (name === 'try') return { kind: 'try', compare, number };
	const figure = SHORT_FIGURES[name] ?? name;
	if (!isFigure(figure)) throw new GroupExpressionError(term, `there is no figure "${name}"`);
	return { kind: 'figure', figure, compare, value: fahrenheit === 'F' ? (number - 32) / 1.8 : number };
}

function listed(term: string, name: string, list: string): Condition {
	if (list === '') throw new GroupExpressionError(term, 'nothing follows the colon');
	switch (name) {
		case 'outcome':
			return { kind: 'outcome', outcomes: members(term, list, OUTCOMES) };
		case 'kind':
			return { kind: 'trip', kinds: members(term, list, TRIP_KINDS) };
		case 'before':
		case 'after':
			return { kind: name, changeId: list };
		case 'from':
		case 'to':
			if (!/^\d{4}-\d{2}-\d{2}$/.test(list) || Number.isNaN(Date.parse(list)))
				throw new GroupExpressionError(term, 'a day is YYYY-MM-DD');
			return { kind: name, date: list };
		case 'ids':
			return { kind: 'ids', ids: list.split(',') };
		default:
			throw new GroupExpressionError(term, `"${name}:" is not known`);
	}
}

function termOf(text: string): Term {
	const not = text.startsWith('!');
	const body = not ? text.slice(1) : text;
	if (body === '') throw new GroupExpressionError(text, 'a term is empty');
	const word = WORDS.find((one) => one === body);
	if (word) return { not, kind: word };
	if (BARE_IDS.test(body)) return { not, kind: 'ids', ids: body.split(',') };
	const list = /^([a-z]+):(.*)$/i.exec(body);
	const comparison = /^([A-Za-z][\w.]*)(<=|>=|<|>|=)(.+)$/.exec(body);
	if (comparison) {
		const [, name = '', compare = '=', value = ''] = comparison;
		return { not, ...compared(text, name, compare as Compare, value) };
	}
	if (list) return { not, ...listed(text, list[1] ?? '', list[2] ?? '') };
	throw new GroupExpressionError(text, 'is no condition; see the API page for those that are');
}

/**
 * Reads a group expression (grammar above).
 * @throws GroupExpressionError naming the term and the reason
 */
export function parseGroup(text: string): GroupExpression {
	const trimmed = text.replace(/\s+/g, '');
	if (trimmed === '') throw new GroupExpressionError(text, 'the expression is empty; "all" takes every start');
	return { text: trimmed, terms: trimmed.split('&').map(termOf) };
}
