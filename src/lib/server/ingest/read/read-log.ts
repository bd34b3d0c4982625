import { unpack, type Leaf } from '../container/unpack';
import { textForm, toUtf8, type TextForm } from '../text/encoding';
import { headerChange, type HeaderChange } from '../layout/header-change';
import { readRows, type ReaderChoice } from '../text/row-reader';
import type { Dictionary, OddRow, RowPlan, RowView } from '../text/row-plan';
import {
	LogRefusal,
	type ColumnMapping,
	type FilePlan,
	type Inspection,
	type Progress,
	type ReadContext,
	type ReadResult,
	type ReadSink,
	type SourceFile
} from '../types';
import { EventRows } from './events';
import { LongRows } from './long';
import { ProblemList, RowClock, tallyProblems, TargetTally, totalQuality } from './quality';
import { RowTime } from './row-time';
import { targetsOf } from './targets';
import { WideRows } from './wide';

/** Told of progress now and then, and waited for. */
type OnProgress = (progress: Progress) => void | Promise<void>;

/** What the readers of the several layouts have in common. */
type Rows = { plan: RowPlan; dictionaries: Dictionary[] };

/** Shortest time between two reports of progress, ms. */
const REPORT_EVERY = 150;

/** Headers of one file at most; each costs a pass over the file up to it. */
const MOST_HEADERS = 20;

/** Watches the rows of a file for a header that is not its own; nothing after it counts. */
class HeaderWatch {
	found: HeaderChange | null = null;
	constructor(readonly plan: FilePlan) {}

	after(line: number): boolean {
		return this.found !== null && line > this.found.line;
	}

	/** Is this odd row another header? */
	sees(line: number, text: string, header: string): boolean {
		if (this.found || text.replace(/["\s]/g, '') === header) return false;
		this.found = headerChange(text, line, this.plan);
		return this.found !== null;
	}
}

class LogReader {
	readonly problems = new ProblemList();
	readonly clocks: RowClock[] = [];
	readonly tallies: TargetTally[] = [];
	readonly taken = new Map<string, string[]>();
	rows = 0;
	events = 0;
	badTimes = 0;
	first = Infinity;
	last = -Infinity;
	bytes = 0;
	readonly totalBytes: number;
	#reported = 0;

	constructor(
		readonly ctx: ReadContext,
		readonly mapping: readonly ColumnMapping[],
		readonly sink: ReadSink,
		readonly onProgress: OnProgress,
		readonly reader: ReaderChoice,
		files: readonly SourceFile[]
	) {
		this.totalBytes = files.reduce((sum, f) => sum + f.size, 0);
	}

	async report(force = false): Promise<void> {
		const now = Date.now();
		if (!force && now - this.#reported < REPORT_EVERY) return;
		this.#reported = now;
		await this.onProgress({
			bytes: Math.min(this.bytes, this.totalBytes),
			totalBytes: this.totalBytes,
			rows: this.rows
		});
	}

	/** Reads one file by its plan. */
	async file(leaf: Leaf, plan: FilePlan, index: number, header: string): Promise<void> {
		const time = new RowTime(plan, this.ctx.now, this.problems);
		if (plan.kind === 'events') await this.#events(leaf, plan, time, header);
		else if (plan.kind === 'long') await this.#long(leaf, plan, index, time, header);
		else await this.#wide(leaf, plan, index, time, header);
		time.finish();
		this.badTimes += time.impossible + time.missing;
	}

	/** A wide table, stretch by stretch: where the header changes in mid-file the columns are placed anew by name. */
	async #wide(leaf: Leaf, plan: FilePlan, index: number, time: RowTime, header: string): Promise<void> {
		const changes =
			plan.columns.length > 0 &&
			targetsOf(plan, this.mapping, this.ctx.airPressure, new Map()).every(
				(target) => target.plan.logging === 'change'
			);
		const clock = new RowClock(changes, plan.time.descending);
		const tallies: TargetTally[] = [];
		let stretch: FilePlan | null = plan;
		for (let n = 0; stretch !== null && n < MOST_HEADERS; n++) {
			stretch = await this.#stretch(leaf, stretch, index, time, n === 0 ? header : stretch.headerText, clock, tallies);
		}
		if (stretch !== null)
			this.#leftOut(stretch.file, stretch.headerLine, `The header changes more than ${MOST_HEADERS} times`);
		this.clocks.push(clock);
		this.tallies.push(...tallies);
	}

	/** Rows up to the end of the file or the next header; gives how the rows after that are read. */
	async #stretch(
		leaf: Leaf,
		plan: FilePlan,
		index: number,
		time: RowTime,
		header: string,
		clock: RowClock,
		tallies: TargetTally[]
	): Promise<FilePlan | null> {
		const targets = targetsOf(plan, this.mapping, this.ctx.airPressure, this.taken);
		const own = targets.map((target) => {
			const same = tallies.find((tally) => tally.target.mapping === target.mapping);
			if (same) return same;
			const fresh = new TargetTally(target, index, plan.intervalSeconds);
			tallies.push(fresh);
			return fresh;
		});
		const rows = new WideRows(plan, index, targets, own, clock);
		const change = new HeaderWatch(plan);
		const take = (view: RowView) => {
			const t = time.at(view.wall, view.offset, view.line);
			if (Number.isNaN(t)) return;
			this.rows++;
			rows.take(t, view);
		};
		for await (const _ of this.#pieces(leaf, plan, rows, take, header, change)) {
			await rows.drain(this.sink);
			if (change.found) break;
		}
		rows.flush();
		await rows.drain(this.sink);
		return this.#changed(plan, change);
	}

	/** What is said of a header that changed, and how the rows after it are read. */
	#changed(plan: FilePlan, change: HeaderWatch): FilePlan | null {
		const { found } = change;
		if (!found) return null;
		const list = (names: readonly string[]): string => names.slice(0, 8).join(', ') + (names.length > 8 ? ' …' : '');
		const said = [
			found.appeared.length > 0 ? `new and not read: ${list(found.appeared)}` : '',
			found.gone.length > 0 ? `gone: ${list(found.gone)}` : ''
		].filter((part) => part !== '');
		const what = `The header changes here${said.length > 0 ? ` (${said.join('; ')})` : ''}`;
		if (!found.plan) {
			this.#leftOut(plan.file, found.line, what);
			return null;
		}
		const message = `${what}; the rows after it are read by their new places.`;
		this.problems.add({ file: plan.file, line: found.line, column: null, kind: 'header-changed', message });
		return found.plan;
	}

	#leftOut(file: string, line: number, what: string): void {
		const message = `${what}; the rows after it were left out. Upload them as a log of their own.`;
		this.problems.add({ file, line, column: null, kind: 'header-changed', message });
	}

	async #long(leaf: Leaf, plan: FilePlan, index: number, time: RowTime, header: string): Promise<void> {
		const targets = targetsOf(plan, this.mapping, this.ctx.airPressure, this.taken);
		const tallies = targets.map((target) => new TargetTally(target, index, plan.intervalSeconds));
		const rows = new LongRows(plan, index, targets, tallies, time);
		const change = new HeaderWatch(plan);
		for await (const _ of this.#pieces(leaf, plan, rows, (view) => rows.take(view), header, change)) {
			await rows.drain(this.sink);
			if (change.found) break;
		}
		this.#changed(plan, change);
		rows.flush();
		await rows.drain(this.sink);
		this.rows += rows.rows;
		for (const [name, n] of [...rows.unknown].slice(0, 20)) {
			this.problems.add({
				file: plan.file,
				line: null,
				column: name,
				kind: 'point-unmapped',
				message: `${n} rows of the point "${name}" were not read: it is not mapped.`
			});
		}
		this.clocks.push(...rows.clocks);
		this.tallies.push(...tallies);
	}

	async #events(leaf: Leaf, plan: FilePlan, time: RowTime, header: string): Promise<void> {
		const rows = new EventRows(plan, this.ctx, time);
		const change = new HeaderWatch(plan);
		for await (const _ of this.#pieces(leaf, plan, rows, (view) => rows.take(view), header, change)) {
			if (change.found) break;
			for (const event of rows.drain()) await this.sink.event(event);
		}
		for (const event of rows.drain()) await this.sink.event(event);
		this.#changed(plan, change);
		this.events += rows.events;
		this.rows += rows.events;
		this.first = Math.min(this.first, rows.first);
		this.last = Math.max(this.last, rows.last);
	}

	async *#pieces(
		leaf: Leaf,
		plan: FilePlan,
		rows: Rows,
		take: (view: RowView) => void,
		header: string,
		change: HeaderWatch
	): AsyncIterable<void> {
		const odd = (line: number, text: string, why: OddRow): void => {
			if (change.after(line) || change.sees(line, text, header)) return;
			this.#odd(plan, line, text, why, header);
		};
		const row = (view: RowView): void => {
			if (!change.after(view.line)) take(view);
		};
		const text = toUtf8(leaf.open(), await formOf(leaf, plan));
		for await (const _ of readRows(text, rows.plan, plan.dataLine, { row, odd }, rows.dictionaries, this.reader)) {
			await this.report();
			yield;
		}
	}

	#odd(plan: FilePlan, line: number, text: string, why: OddRow, header: string): void {
		const bare = text.replace(/["\s]/g, '');
		if (bare.split(plan.delimiter).every((cell) => cell === '')) return;
		if (header !== '' && bare === header) return;
		const shown = text.length > 60 ? `${text.slice(0, 60)}…` : text;
		if (why === 'long') {
			const message = `The row has more cells than the header: "${shown}". It was left out.`;
			this.problems.add({ file: plan.file, line, column: null, kind: 'row-too-long', message });
		} else {
			const message = `The row has no time that can be read: "${shown}". It was left out.`;
			this.problems.add({ file: plan.file, line, column: null, kind: 'row-no-time', message });
		}
	}

	result(fileOf: (i: number) => string): ReadResult {
		for (const problem of tallyProblems(this.tallies, fileOf)) this.problems.add(problem);
		const quality = totalQuality(this.clocks, this.tallies, this.badTimes);
		const first = Math.min(this.first, ...this.clocks.map((c) => c.first));
		const last = Math.max(this.last, ...this.clocks.map((c) => c.last));
		return {
			rows: this.rows,
			samples: this.tallies.reduce((sum, tally) => sum + tally.samples, 0),
			events: this.events,
			firstAt: Number.isFinite(first) ? first : null,
			lastAt: Number.isFinite(last) ? last : null,
			quality,
			signals: this.tallies.map((tally) => tally.quality(tally.target.plan.spacingSeconds)),
			problems: this.problems.all(),
			refused: false
		};
	}
}

async function formOf(leaf: Leaf, plan: FilePlan): Promise<TextForm> {
	const parts: Uint8Array[] = [];
	let size = 0;
	for await (const chunk of leaf.open()) {
		parts.push(chunk);
		size += chunk.length;
		if (size >= 65_536) break;
	}
	return { ...textForm(Buffer.concat(parts)), encoding: plan.encoding };
}

/** Files that count what was read from them, for progress. */
function counted(files: readonly SourceFile[], reader: () => LogReader | null): SourceFile[] {
	const most = files.map(() => 0);
	return files.map((file, i) => ({
		name: file.name,
		size: file.size,
		async *open() {
			let at = 0;
			for await (const chunk of file.open()) {
				at += chunk.length;
				if (at > (most[i] ?? 0)) {
					most[i] = at;
					const r = reader();
					if (r) r.bytes = most.reduce((a, b) => a + b, 0);
				}
				yield chunk;
			}
		}
	}));
}

/**
 * Converts a log by its inspection and mapping and hands its readings to the sink, piece by piece. Columns without a
 * signal are passed over.
 * @param reader `exact` reads every file with PapaParse: for tests of the two readers' agreement
 * @throws LogRefusal when a file turns out unreadable; what the sink got of it must then be dropped
 */
export async function readLog(
	files: readonly SourceFile[],
	ctx: ReadContext,
	inspection: Inspection,
	mapping: readonly ColumnMapping[],
	sink: ReadSink,
	onProgress: OnProgress = () => undefined,
	reader: ReaderChoice = 'auto'
): Promise<ReadResult> {
	let log: LogReader | null = null;
	const sources = counted(files, () => log);
	const { leaves, close } = await unpack(sources);
	try {
		log = new LogReader(ctx, mapping, sink, onProgress, reader, files);
		log.bytes = 0;
		for (const [index, plan] of inspection.files.entries()) {
			if (plan.kind === 'empty') continue;
			const leaf = leaves.find((l) => l.source === plan.source && l.entry.join('/') === plan.entry.join('/'));
			if (!leaf) throw new LogRefusal('file-missing', `${plan.file} is no longer in the upload.`, plan.file);
			await log.file(leaf, plan, index, plan.headerText);
		}
		await log.report(true);
		return log.result((i) => inspection.files[i]?.file ?? '');
	} finally {
		await close();
	}
}
