import type { CaseRow, CaseState } from '$lib/model/wire/case';
import { counted } from '$lib/utils/format';

/** The parts of the board, in the order a manager works them. */
export const BOARD: readonly { title: string; states: readonly CaseState[]; empty: string }[] = [
	{ title: 'To plan', states: ['reopened', 'open'], empty: 'Every open case has a day.' },
	{ title: 'Visit planned', states: ['visit planned'], empty: 'No visit is planned.' },
	{ title: 'Changed, to be proved', states: ['changed'], empty: 'No change waits for its proof.' },
	{ title: 'Proved, to be closed', states: ['proved'], empty: 'Nothing is proved and still open.' }
];

/** The finding over the board. */
export function boardTitle(cases: readonly CaseRow[]): string {
	const open = cases.filter((row) => row.state !== 'closed');
	const back = open.filter((row) => row.state === 'reopened');
	if (back.length > 0) return `${counted(back.length, 'case')} came back after the change`;
	const waiting = open.filter((row) => row.state === 'open').length;
	if (open.length === 0) return 'No open case';
	if (waiting > 0) return `${waiting} of ${counted(open.length, 'open case')} wait for a day`;
	return `${counted(open.length, 'open case')}, each with a day or a change`;
}

/** What each kind of timeline entry is called. */
export const ENTRY_WORDS: Readonly<Record<string, string>> = {
	opened: 'Call',
	attached: 'Attached',
	assigned: 'Given',
	visit: 'Visit',
	brief: 'Brief',
	check: 'Check',
	signed: 'Signed',
	change: 'Change',
	note: 'Note',
	proved: 'Proof',
	report: 'Report',
	closed: 'Closed',
	reopened: 'Back'
};
