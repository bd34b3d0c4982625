import { mergeBlocks } from '$lib/server/ingest';
import { findBlocks, findTimes, overlapsAnother, type FoundBlock } from '$lib/server/repositories/blocks';
import type { Tx } from '$lib/server/repositories/transaction';
import { blockDecoder } from './series';

/** Where logs overlap in time and their readings differ. */

const CIRCUITS = ['1', '2', '3', '4'];

const overlap = (a: readonly FoundBlock[], b: readonly FoundBlock[]): boolean =>
	a.some((one) => b.some((other) => one.firstAt <= other.lastAt && other.firstAt <= one.lastAt));

/**
 * How many readings of a log differ from those of the unit's other logs at the same instant, signal by signal. Only
 * stretches that overlap are decoded.
 */
export async function countConflicts(
	tx: Tx,
	unitId: string,
	logId: string,
	window: { from: number; to: number }
): Promise<number> {
	if (!(await overlapsAnother(tx, unitId, logId, window))) return 0;
	const groups = new Map<string, Map<string, FoundBlock[]>>();
	for (const block of await findBlocks(tx, unitId, CIRCUITS, window, null)) {
		const key = `${block.circuit} ${block.signal}`;
		const logs = groups.get(key) ?? new Map<string, FoundBlock[]>();
		logs.set(block.logId, [...(logs.get(block.logId) ?? []), block]);
		groups.set(key, logs);
	}
	let conflicts = 0;
	for (const logs of groups.values()) {
		const own = logs.get(logId);
		if (!own) continue;
		for (const [other, blocks] of logs) {
			if (other === logId || !overlap(own, blocks)) continue;
			const decode = blockDecoder(await findTimes(tx, [...own, ...blocks]));
			conflicts += mergeBlocks([...own, ...blocks].map(decode)).conflicts;
		}
	}
	return conflicts;
}
