import { SIGNALS } from '$lib/model/signals';
import type { Log } from '$lib/model/wire/log';
import { formatDate, formatDuration } from '$lib/utils/clock';
import { counted, formatNumber, formatShare } from '$lib/utils/format';

/** How a log stands, in words beside its stroke. */
export function logWords(log: Log, timeZone: string, secondsLeft: number | null = null): string {
	switch (log.state) {
		case 'received':
			return 'stored, waits for the reader';
		case 'reading': {
			const left = secondsLeft === null ? '' : `, about ${formatDuration(Math.max(1, secondsLeft))} left`;
			return `reading, ${formatNumber(log.rows)} rows, ${formatShare(log.progress)}${left}`;
		}
		case 'analysing':
			return `read, ${formatNumber(log.rows)} rows; finding the starts`;
		case 'needs-mapping':
			return 'asks which column is which';
		case 'ready':
			return `${formatNumber(log.rows)} rows, ${spanWords(log, timeZone)}`;
		case 'refused':
			return problemWords(log.problems[0]) ?? 'refused';
	}
}

/** "Mon 2 Nov to Sun 29 Nov". */
export function spanWords(log: Pick<Log, 'firstAt' | 'lastAt'>, timeZone: string): string {
	if (log.firstAt === null || log.lastAt === null) return 'no instant read';
	const [from, to] = [formatDate(log.firstAt, timeZone), formatDate(log.lastAt, timeZone)];
	return from === to ? from : `${from} to ${to}`;
}

/** A problem with its place: "line 12, column ev: …". */
export function problemWords(problem: Log['problems'][number] | undefined): string | null {
	if (!problem) return null;
	const place = [
		problem.line === null ? '' : `line ${formatNumber(problem.line)}`,
		problem.column ? `column ${problem.column}` : ''
	]
		.filter(Boolean)
		.join(', ');
	return place ? `${place}: ${problem.message}` : problem.message;
}

/** How the logs of a unit stand, as the sheet's heading. */
export function logsTitle(logs: readonly Log[], tag: string): string {
	if (logs.length === 0) return `No log of ${tag} yet: drop one here`;
	const count = (state: Log['state'][]) => logs.filter((log) => state.includes(log.state)).length;
	const [asking, reading, refused] = [
		count(['needs-mapping']),
		count(['received', 'reading', 'analysing']),
		count(['refused'])
	];
	if (asking > 0) return `${counted(asking, 'log')} ${asking === 1 ? 'waits' : 'wait'} for a word about columns`;
	if (reading > 0) return `${counted(reading, 'log')} of ${tag} ${reading === 1 ? 'is' : 'are'} being read`;
	if (refused > 0) return `${counted(refused, 'log')} of ${logs.length} could not be read`;
	return `${counted(logs.length, 'log')} of ${tag} ${logs.length === 1 ? 'is' : 'are'} in`;
}

/** A layout in words: one line under the heading of a log. */
export function layoutWords(layout: Log['layout']): string {
	if (layout === null) return 'The layout is not known yet.';
	const kind = {
		wide: 'One column a signal',
		long: 'One row a reading',
		'per-signal': 'One file a signal'
	}[layout.kind];
	const delimiter = { ',': 'comma', ';': 'semicolon', '\t': 'tab', '|': 'bar' }[layout.delimiter] ?? layout.delimiter;
	const parts = [
		kind,
		delimiter ? `${delimiter} between cells` : '',
		`decimal ${layout.decimal === ',' ? 'comma' : 'point'}`,
		layout.encoding,
		`header on line ${layout.headerLine}`,
		`time as ${layout.timeForm}, ${layout.timeZone}`,
		layout.intervalSeconds === null ? 'changes only or uneven' : `every ${formatDuration(layout.intervalSeconds)}`
	];
	return parts.filter(Boolean).join(', ') + '.';
}

/** A signal's label; a second or third of its kind is numbered. */
export function signalLabel(key: string): string {
	const [base = key, number] = key.split('.');
	const label = Object.hasOwn(SIGNALS, base) ? SIGNALS[base as keyof typeof SIGNALS].label : base;
	return number ? `${label} ${number}` : label;
}
