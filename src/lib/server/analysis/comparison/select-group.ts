import type { ChangeFact } from '$lib/model/checks';
import type { StartRecord } from '$lib/model/start';
import { FIGURE_WORDS, OUTCOME_WORDS, TRIP_KIND_WORDS } from '$lib/model/words';
import { FIGURES } from '$lib/model/start';
import { siteClock } from '../wording/site-clock';
import { clockWords } from '../wording/site-clock';
import { listWords, type Words } from '../wording/quantity-words';
import { type Compare, GroupExpressionError, type GroupExpression, type Term } from './group-grammar';

export type GroupContext = {
	timeZone: string;
	changes: readonly ChangeFact[];
	/** The id a start has in the store, for `ids:`; without it `ids:` is refused. */
	idOf?: (start: StartRecord) => string;
};

function holds(value: number, compare: Compare, against: number): boolean {
	switch (compare) {
		case '<':
			return value < against;
		case '<=':
			return value <= against;
		case '=':
			return value === against;
		case '>=':
			return value >= against;
		case '>':
			return value > against;
	}
}

function changeAt(term: Term & { kind: 'before' | 'after' }, context: GroupContext): number {
	const change = context.changes.find((one) => one.id === term.changeId);
	if (!change) throw new GroupExpressionError(`${term.kind}:${term.changeId}`, 'there is no such change on this unit');
	return change.at;
}

function meets(term: Term, start: StartRecord, context: GroupContext): boolean {
	const clock = () => siteClock(start.startedAt, context.timeZone);
	switch (term.kind) {
		case 'all':
			return true;
		case 'first':
			return start.firstStart;
		case 'later':
			return !start.firstStart;
		case 'attended':
			return start.attended;
		case 'weekend':
			return clock().weekday % 6 === 0;
		case 'working-day':
			return clock().weekday % 6 !== 0;
		case 'rest':
			return start.restSeconds !== null && holds(start.restSeconds, term.compare, term.seconds);
		case 'clock':
			return holds(clock().minutes, term.compare, term.minutes);
		case 'try':
			return holds(start.tryNumber, term.compare, term.number);
		case 'figure': {
			const value = start.figures[term.figure];
			return value !== null && holds(value, term.compare, term.value);
		}
		case 'outcome':
			return term.outcomes.includes(start.outcome);
		case 'trip':
			return start.trip !== null && term.kinds.includes(start.trip.kind);
		case 'before':
			return start.startedAt < changeAt(term, context);
		case 'after':
			return start.startedAt >= changeAt(term, context);
		case 'from':
			return clock().date >= term.date;
		case 'to':
			return clock().date <= term.date;
		case 'ids':
			if (!context.idOf) throw new GroupExpressionError('ids:', 'starts have no ids here');
			return term.ids.includes(context.idOf(start));
	}
}

/**
 * The starts that meet every term. A condition on a reading that a start does not have is not met, turned round or not.
 * @throws GroupExpressionError when a change or ids are named that are not there
 */
export function selectGroup(
	starts: readonly StartRecord[],
	expression: GroupExpression,
	context: GroupContext
): StartRecord[] {
	const unknown = (term: Term, start: StartRecord) =>
		(term.kind === 'figure' && start.figures[term.figure] === null) ||
		(term.kind === 'rest' && start.restSeconds === null);
	return starts.filter((start) =>
		expression.terms.every((term) => !unknown(term, start) && meets(term, start, context) !== term.not)
	);
}

const COMPARE_WORDS: Readonly<Record<Compare, string>> = {
	'<': 'under',
	'<=': 'at most',
	'=': 'exactly',
	'>=': 'at least',
	'>': 'over'
};

function lengthWords(seconds: number): string {
	if (seconds % 86_400 === 0) return `${seconds / 86_400} d`;
	if (seconds % 3600 === 0) return `${seconds / 3600} h`;
	return seconds % 60 === 0 ? `${seconds / 60} min` : `${seconds} s`;
}

function termWords(term: Term, context: GroupContext, words: Words): string {
	switch (term.kind) {
		case 'all':
			return 'all starts';
		case 'first':
			return 'first starts';
		case 'later':
			return 'starts after a short rest';
		case 'attended':
			return 'attended starts';
		case 'weekend':
			return 'weekends';
		case 'working-day':
			return 'working days';
		case 'rest':
			return `rest ${COMPARE_WORDS[term.compare]} ${lengthWords(term.seconds)}`;
		case 'clock':
			return `${term.compare.startsWith('<') ? 'before' : 'from'} ${clockWords(term.minutes)}`;
		case 'try':
			return `try ${term.compare === '=' ? '' : `${COMPARE_WORDS[term.compare]} `}${term.number}`;
		case 'figure':
			return `${FIGURE_WORDS[term.figure].toLowerCase()} ${COMPARE_WORDS[term.compare]} ${words.of(term.value, FIGURES[term.figure])}`;
		case 'outcome':
			return listWords(term.outcomes.map((outcome) => OUTCOME_WORDS[outcome]));
		case 'trip':
			return `tripped on ${listWords(term.kinds.map((kind) => TRIP_KIND_WORDS[kind]))}`;
		case 'before':
		case 'after':
			return `${term.kind} “${context.changes.find((one) => one.id === term.changeId)?.text ?? term.changeId}”`;
		case 'from':
			return `from ${term.date}`;
		case 'to':
			return `to ${term.date}`;
		case 'ids':
			return `${term.ids.length} picked by hand`;
	}
}

/** A group in words, as its heading: "First starts, before 11:00". */
export function groupWords(expression: GroupExpression, context: GroupContext, words: Words): string {
	const text = expression.terms.map((term) => `${term.not ? 'not ' : ''}${termWords(term, context, words)}`).join(', ');
	return text.charAt(0).toUpperCase() + text.slice(1);
}
