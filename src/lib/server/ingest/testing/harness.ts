import type { SeriesId } from '$lib/model/signals';
import { inspectLog } from '../inspect/inspect-log';
import { readLog } from '../read/read-log';
import type { ReaderChoice } from '../text/row-reader';
import type {
	Inspection,
	RawBlock,
	ReadContext,
	ReadEvent,
	ReadResult,
	SourceFile,
	TextBlock,
	UnitRef
} from '../types';

/** A file of an upload from bytes or text, given out in pieces. */
export function sourceFile(name: string, content: string | Uint8Array, piece = 50_000): SourceFile {
	const bytes = typeof content === 'string' ? Buffer.from(content, 'utf8') : content;
	return {
		name,
		size: bytes.length,
		async *open() {
			for (let at = 0; at < bytes.length; at += piece) yield bytes.subarray(at, at + piece);
		}
	};
}

export function unitRef(tag = 'CH-1', circuits = 1, unitId = 'unit-1'): UnitRef {
	return { unitId, tag, refrigerant: 'R-134a', circuits, ratedAmps: null };
}

/** A context of an invented site in New York on 1 December 2025. */
export function context(change: Partial<ReadContext> = {}): ReadContext {
	return {
		unit: unitRef(),
		siblings: [],
		timeZone: 'America/New_York',
		zoneOverride: null,
		airPressure: 101.325,
		now: Date.UTC(2025, 11, 1),
		remembered: [],
		ask: false,
		...change
	};
}

export type ReadBack = {
	inspection: Inspection;
	result: ReadResult | null;
	blocks: RawBlock[];
	texts: TextBlock[];
	events: ReadEvent[];
	/** Readings of a signal in time order, NaN ones left out. */
	series(signal: SeriesId, circuit?: string, unitId?: string): { t: number[]; v: number[] };
};

/** Inspects and, unless refused, reads. */
export async function readBack(
	files: SourceFile[],
	ctx: ReadContext = context(),
	reader: ReaderChoice = 'auto'
): Promise<ReadBack> {
	const inspection = await inspectLog(files, ctx);
	const blocks: RawBlock[] = [];
	const texts: TextBlock[] = [];
	const events: ReadEvent[] = [];
	const sink = {
		block: async (b: RawBlock) => void blocks.push(b),
		text: async (b: TextBlock) => void texts.push(b),
		event: async (e: ReadEvent) => void events.push(e)
	};
	const result =
		inspection.decision === 'refused'
			? null
			: await readLog(files, ctx, inspection, inspection.mapping, sink, undefined, reader);
	return {
		inspection,
		result,
		blocks,
		texts,
		events,
		series(signal, circuit = '1', unitId = 'unit-1') {
			const pairs = blocks
				.filter((b) => b.signal === signal && b.circuit === circuit && b.unitId === unitId)
				.flatMap((b) => [...b.t].map((t, i): [number, number] => [t, b.v[i] ?? NaN]))
				.filter(([, v]) => !Number.isNaN(v))
				.sort((a, b) => a[0] - b[0]);
			return { t: pairs.map((p) => p[0]), v: pairs.map((p) => p[1]) };
		}
	};
}
