import type { StartSheet } from '$lib/model/wire/start-sheet';

type StartClue = StartSheet['clues'][number];

/** How many clues of each direction a sheet has room for. */
const ROOM = { for: 3, against: 2, missing: 1 } as const;
/** Two clues of one suspect say what there is to say; the rest stands on the suspects' sheet. */
const EACH = 2;

/** The clues worth their room beside a start: the weightiest of each direction, no suspect more than twice. */
export function tellingClues(clues: readonly StartClue[]): StartClue[] {
	const chosen: StartClue[] = [];
	for (const direction of ['for', 'against', 'missing'] as const) {
		const own = clues.filter((clue) => clue.direction === direction).sort((a, b) => b.weight - a.weight);
		const each = new Map<string, number>();
		const said = new Set<string>();
		let room: number = ROOM[direction];
		for (const clue of own) {
			const count = each.get(clue.suspect) ?? 0;
			if (room === 0 || count >= EACH || said.has(clue.sentence)) continue;
			each.set(clue.suspect, count + 1);
			said.add(clue.sentence);
			chosen.push(clue);
			room--;
		}
	}
	return chosen;
}
