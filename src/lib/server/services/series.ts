import type { EventRecord, Series, SeriesMap, TextSeries } from '$lib/model/series';
import { SIGNALS, signalOf, type SeriesId } from '$lib/model/signals';
import { decodeTimes, decodeValues, mergeBlocks, type DecodedBlock } from '$lib/server/ingest';
import {
	findBlocks,
	findEvents,
	findTimes,
	findWords,
	type FoundBlock,
	type Window
} from '$lib/server/repositories/blocks';
import type { Tx } from '$lib/server/repositories/transaction';

/** Stored blocks as series: what analysis and traces read. */

const partKey = (logId: string, part: number): string => `${logId}:${part}`;

/** Joins arrays of one kind; a single one is given back as it is. */
function joined(arrays: readonly Float64Array[]): Float64Array {
	const [only] = arrays;
	if (arrays.length === 1 && only) return only;
	const all = new Float64Array(arrays.reduce((sum, array) => sum + array.length, 0));
	let offset = 0;
	for (const array of arrays) {
		all.set(array, offset);
		offset += array.length;
	}
	return all;
}

/** Blocks in time order, when none overlaps another and all are logged alike; else null. */
function inSequence(blocks: readonly FoundBlock[]): FoundBlock[] | null {
	const sorted = [...blocks].sort((a, b) => a.firstAt - b.firstAt);
	for (let i = 1; i < sorted.length; i++) {
		const before = sorted[i - 1];
		const here = sorted[i];
		if (!before || !here || before.lastAt >= here.firstAt || before.change !== here.change) return null;
	}
	return sorted;
}

/** Decodes blocks whose instants are among `times`. @throws Error when they are not */
export function blockDecoder(
	times: readonly { logId: string; part: number; times: Uint8Array }[]
): (block: FoundBlock) => DecodedBlock {
	const known = new Map(times.map((row) => [partKey(row.logId, row.part), decodeTimes(row.times)]));
	return (block) => {
		const t = known.get(partKey(block.logId, block.part));
		if (!t) throw new Error(`block ${block.logId} ${block.part} has lost its instants`);
		return {
			ordinal: block.ordinal,
			t,
			v: decodeValues(block.values),
			logging: block.change ? 'change' : 'interval',
			increment: block.increment,
			measure: block.measure
		};
	};
}

/** Makes one series of each group of blocks; row-aligned series of the same blocks share their instants. */
class SeriesBuilder {
	readonly #decode: (block: FoundBlock) => DecodedBlock;
	#joined = new Map<string, Float64Array>();

	constructor(times: Parameters<typeof blockDecoder>[0]) {
		this.#decode = blockDecoder(times);
	}

	build(blocks: readonly FoundBlock[]): Series {
		const sorted = inSequence(blocks);
		const decoded = (sorted ?? blocks).map((block) => this.#decode(block));
		if (!sorted) return mergeBlocks(decoded).series;
		const key = sorted.map((block) => partKey(block.logId, block.part)).join(' ');
		const t = this.#joined.get(key) ?? joined(decoded.map((block) => block.t));
		this.#joined.set(key, t);
		const last = decoded.at(-1);
		const increments = decoded.flatMap((block) => (block.increment === null ? [] : [block.increment]));
		return {
			t,
			v: joined(decoded.map((block) => block.v)),
			logging: last?.logging ?? 'interval',
			...(increments.length > 0 ? { increment: Math.max(...increments) } : {}),
			...(last?.measure ? { measure: last.measure } : {})
		};
	}
}

/**
 * Series of a unit by circuit. A circuit's map holds its own signals and the unit-wide ones, whichever circuit's
 * column they were mapped to.
 */
export async function loadSeries(
	tx: Tx,
	unitId: string,
	circuits: readonly string[],
	options: { window?: Window; signals?: readonly string[] } = {}
): Promise<Map<string, SeriesMap>> {
	const found = await findBlocks(tx, unitId, ALL_CIRCUITS, options.window ?? null, options.signals ?? null);
	const parts = new Map(
		found.map((block) => [partKey(block.logId, block.part), { logId: block.logId, part: block.part }])
	);
	const builder = new SeriesBuilder(await findTimes(tx, [...parts.values()]));
	const groups = new Map<string, FoundBlock[]>();
	for (const block of found) {
		const key = `${block.circuit} ${block.signal}`;
		const group = groups.get(key);
		if (group) group.push(block);
		else groups.set(key, [block]);
	}
	const maps = new Map<string, SeriesMap>(circuits.map((circuit) => [circuit, {}]));
	for (const [key, blocks] of groups) {
		const [home = '1', id] = key.split(' ') as [string, SeriesId];
		const series = builder.build(blocks);
		const unitWide = SIGNALS[signalOf(id)].scope === 'unit';
		for (const [circuit, map] of maps) {
			if (circuit === home || (unitWide && !map[id])) map[id] = series;
		}
	}
	return maps;
}
const ALL_CIRCUITS = ['1', '2', '3', '4'];

type Words = NonNullable<Awaited<ReturnType<typeof findWords>>[number]>;

/** Words of one column in time order; the later upload wins where logs overlap. */
function textSeries(parts: readonly Words[]): TextSeries {
	const rows = parts.flatMap((part) =>
		part.words.t.map((t, i) => ({ t, text: part.words.text[i] ?? '', ordinal: part.ordinal }))
	);
	rows.sort((a, b) => a.t - b.t || a.ordinal - b.ordinal);
	const kept = rows.filter((row, i) => rows[i + 1]?.t !== row.t);
	return { t: Float64Array.from(kept, (row) => row.t), text: kept.map((row) => row.text) };
}

export type CircuitTexts = { unitMode?: TextSeries; activeLimit?: TextSeries; alarm?: TextSeries };

/** Mode, limit and alarm columns by circuit. An alarm column of the whole unit counts for each circuit that has none. */
export async function loadTexts(
	tx: Tx,
	unitId: string,
	circuits: readonly string[],
	window?: Window
): Promise<Map<string, CircuitTexts>> {
	const found = await findWords(tx, unitId, ALL_CIRCUITS, window ?? null);
	const texts = new Map<string, CircuitTexts>();
	for (const circuit of circuits) {
		const own: CircuitTexts = {};
		for (const signal of ['unitMode', 'activeLimit', 'alarm'] as const) {
			const mine = found.filter((part) => part.signal === signal && part.circuit === circuit);
			const parts =
				mine.length > 0 ? mine : signal === 'unitMode' ? found.filter((part) => part.signal === signal) : [];
			if (parts.length > 0) own[signal] = textSeries(parts);
		}
		texts.set(circuit, own);
	}
	return texts;
}

/** Rows of alarm and event histories for one circuit, repeats of overlapping logs counted once. */
export async function loadEvents(tx: Tx, unitId: string, circuit: string, window?: Window): Promise<EventRecord[]> {
	const found = await findEvents(tx, unitId, window ?? null);
	const seen = new Set<string>();
	const kept: EventRecord[] = [];
	for (const { event } of found) {
		if (event.circuit !== circuit && event.circuit !== '' && event.circuit !== '0') continue;
		const key = `${event.at} ${event.what} ${event.code ?? ''} ${event.text}`;
		if (seen.has(key)) continue;
		seen.add(key);
		const { at, text, code, severity, what } = event;
		kept.push({ at, text, severity, what, source: 'history', ...(code ? { code } : {}) });
	}
	return kept;
}
