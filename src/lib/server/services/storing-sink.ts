import { encodeTimes, encodeValues, type ReadSink } from '$lib/server/ingest';
import {
	insertBlocks,
	type NewBlock,
	type NewEvent,
	type NewTimes,
	type NewWords
} from '$lib/server/repositories/blocks';
import { withOrganisation } from '$lib/server/repositories/transaction';

/** About so many blocks an insert cost least in a spike. */
const BLOCKS_PER_INSERT = 60;

/** Buffers what reading gives and stores it in batches, each in one transaction. */
export class StoringSink implements ReadSink {
	readonly touched = new Set<string>();
	#parts = new Map<Float64Array, number>();
	#nextPart = 0;
	#line = 0;
	#times: NewTimes[] = [];
	#blocks: NewBlock[] = [];
	#words: NewWords[] = [];
	#events: NewEvent[] = [];

	constructor(private readonly job: { organisationId: string; logId: string }) {}

	async block(raw: Parameters<ReadSink['block']>[0]): Promise<void> {
		const part = this.#partOf(raw.t);
		const first = raw.t[0];
		const last = raw.t.at(-1);
		if (first === undefined || last === undefined) return;
		const { organisationId, logId } = this.job;
		let least = Infinity;
		let most = -Infinity;
		for (const value of raw.v) {
			if (value < least) least = value;
			if (value > most) most = value;
		}
		this.touched.add(raw.unitId);
		this.#blocks.push({
			organisationId,
			logId,
			unitId: raw.unitId,
			circuit: raw.circuit,
			signal: raw.signal,
			part,
			firstAt: first,
			lastAt: last,
			count: raw.t.length,
			least: least <= most ? least : null,
			most: least <= most ? most : null,
			change: raw.logging === 'change',
			increment: raw.increment,
			measure: raw.measure,
			values: encodeValues(raw.v, raw.scale)
		});
		if (this.#blocks.length >= BLOCKS_PER_INSERT) await this.flush();
	}

	async text(raw: Parameters<ReadSink['text']>[0]): Promise<void> {
		const first = raw.t[0];
		const last = raw.t.at(-1);
		if (first === undefined || last === undefined) return;
		const { organisationId, logId } = this.job;
		this.touched.add(raw.unitId);
		this.#words.push({
			organisationId,
			logId,
			unitId: raw.unitId,
			circuit: raw.circuit,
			signal: raw.signal,
			part: this.#nextPart++,
			firstAt: first,
			lastAt: last,
			words: { t: [...raw.t], text: raw.text }
		});
		if (this.#words.length >= BLOCKS_PER_INSERT) await this.flush();
	}

	async event(raw: Parameters<ReadSink['event']>[0]): Promise<void> {
		const { organisationId, logId } = this.job;
		this.touched.add(raw.unitId);
		const { unitId, circuit, at, text, code, severity, what } = raw;
		this.#events.push({
			organisationId,
			logId,
			line: this.#line++,
			unitId,
			circuit,
			at: Math.round(at),
			text,
			code: code ?? null,
			severity,
			what
		});
		if (this.#events.length >= 500) await this.flush();
	}

	/** Row-aligned blocks share their instants, which are stored once. */
	#partOf(t: Float64Array): number {
		const known = this.#parts.get(t);
		if (known !== undefined) return known;
		// Only the chunk at hand can be shared; older ones would keep their arrays alive.
		if (this.#parts.size > 64) this.#parts.clear();
		const part = this.#nextPart++;
		this.#parts.set(t, part);
		this.#times.push({ organisationId: this.job.organisationId, logId: this.job.logId, part, times: encodeTimes(t) });
		return part;
	}

	async flush(): Promise<void> {
		const batch = { times: this.#times, blocks: this.#blocks, words: this.#words, events: this.#events };
		this.#times = [];
		this.#blocks = [];
		this.#words = [];
		this.#events = [];
		await withOrganisation(this.job.organisationId, (tx) => insertBlocks(tx, batch));
	}
}
