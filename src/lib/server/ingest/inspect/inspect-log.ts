import { isMeasureKey } from '$lib/model/quantities';
import { SIGNALS } from '$lib/model/signals';
import { guessColumns, SURE, type Guess } from '../columns/guess';
import { loggingOf, rowsOnChange, spacingOf } from '../columns/logging';
import { settlePressures } from '../columns/pressure';
import type { ColumnSample } from '../columns/sample';
import {
	checkRelations,
	checkRunning,
	confirmSaturations,
	findDead,
	findDuplicates,
	settleRivals
} from '../columns/settle';
import { unpack, type Unpacked } from '../container/unpack';
import { draftFile, usualStep, type Draft } from '../layout/draft';
import { look } from '../text/look';
import {
	LogRefusal,
	type Choice,
	type ColumnMapping,
	type InspectedColumn,
	type Inspection,
	type Layout,
	type Problem,
	type ReadContext,
	type RememberedMapping,
	type SourceFile,
	type UnitRef
} from '../types';
import { nothingKnown, openQuestions } from './decide';
import { namePerSignal } from './per-signal';
import { longSamples, rowTimes, wideSamples } from './samples';
import { headerSignature, recall, recallColumn } from './signature';

const TRACE = 120;

function refused(problems: Problem[]): Inspection {
	return {
		decision: 'refused',
		questions: [],
		layout: null,
		files: [],
		columns: [],
		lines: [],
		choices: [],
		problems,
		headerSignature: '',
		mapping: []
	};
}

async function draftAll(unpacked: Unpacked, ctx: ReadContext): Promise<{ drafts: Draft[]; problems: Problem[] }> {
	const drafts: Draft[] = [];
	const problems = [...unpacked.problems];
	for (const leaf of unpacked.leaves) {
		const draft = draftFile(leaf, await look(leaf), ctx);
		if ('message' in draft) problems.push(draft);
		else drafts.push(draft);
	}
	return { drafts, problems };
}

/** What one file settled about time holds for the others of the log: they come from one logger. */
function settledElsewhere(drafts: readonly Draft[]): Record<string, string> {
	const answers: Record<string, string> = {};
	for (const draft of drafts) {
		for (const choice of draft.choices) {
			if (choice.key !== 'zone' && choice.key !== 'year' && choice.sure) answers[choice.key] ??= choice.chosen;
		}
		const { order } = draft.plan.time;
		if ((order === 'dmy' || order === 'mdy') && !draft.choices.some((c) => c.key === 'date-order'))
			answers['date-order'] ??= order;
	}
	return answers;
}

function layoutOf(drafts: readonly Draft[]): Layout {
	const main = drafts.find((d) => d.plan.kind !== 'events') ?? drafts[0];
	if (!main) throw new TypeError('a log without a table has no layout');
	const { plan } = main;
	const several = drafts.filter((d) => d.plan.kind === 'per-signal').length > 0;
	return {
		kind:
			plan.kind === 'long' || plan.kind === 'events'
				? 'long'
				: several && plan.kind === 'per-signal'
					? 'per-signal'
					: 'wide',
		delimiter: plan.delimiter,
		decimal: plan.decimal,
		encoding: plan.encoding,
		headerLine: plan.headerLine,
		timeForm: plan.time.form,
		timeZone: plan.time.carriesZone ? 'in the stamps' : plan.time.zone,
		intervalSeconds: plan.intervalSeconds
	};
}

function mergeChoices(drafts: readonly Draft[]): Choice[] {
	const byKey = new Map<string, Choice>();
	for (const choice of drafts.flatMap((d) => d.choices)) {
		const known = byKey.get(choice.key);
		if (!known || (known.sure && !choice.sure)) byKey.set(choice.key, choice);
	}
	return [...byKey.values()];
}

function traceOf(sample: ColumnSample): (number | null)[] {
	const order = sample.t.map((t, i) => [t, sample.v[i] ?? NaN] as const).sort((a, b) => a[0] - b[0]);
	const n = Math.min(TRACE, order.length);
	return Array.from({ length: n }, (_, i) => {
		const v = order[Math.floor((i * order.length) / n)]?.[1] ?? NaN;
		return Number.isNaN(v) ? null : v;
	});
}

function entryOf(guess: Guess, file: string): ColumnMapping {
	return {
		file,
		column: guess.sample.column,
		signal: guess.signal,
		unitId: guess.unitId,
		circuit: guess.circuit,
		unitOfMeasure: guess.signal ? guess.measure : null,
		confidence: Math.round(guess.confidence * 100) / 100,
		confirmed: false
	};
}

function inspected(guess: Guess, entry: ColumnMapping, lines: readonly number[]): InspectedColumn {
	const { sample } = guess;
	const { least, most } = sample.shape;
	return {
		file: entry.file,
		column: sample.column,
		role: guess.signal ? 'signal' : 'unknown',
		guess: entry,
		reasons: guess.reasons,
		range: Number.isNaN(least) ? null : { least, most },
		trace: traceOf(sample),
		cells: lines.map((i) => sample.cells[i] ?? '')
	};
}

/** Fills in what the columns show about their logging, once their samples are there. */
function planColumns(draft: Draft, samples: readonly ColumnSample[], ctx: ReadContext): void {
	const times =
		draft.plan.kind === 'long'
			? []
			: rowTimes(draft, ctx)
					.slice(0, draft.headRows)
					.filter((t) => !Number.isNaN(t));
	const onChange = rowsOnChange(times);
	draft.plan.columns = samples.map((sample) => ({
		index: sample.index,
		column: sample.column,
		logging: onChange ? 'change' : loggingOf(sample),
		increment: sample.shape.increment,
		spacingSeconds: spacingOf(sample),
		words: sample.shape.numbers < 0.5 * sample.shape.filled,
		role: 'signal'
	}));
	draft.plan.intervalSeconds =
		times.length > 1
			? usualStep(times)
			: (draft.plan.columns.map((c) => c.spacingSeconds).find((s) => s !== null) ?? null);
}

async function gather(drafts: readonly Draft[], ctx: ReadContext): Promise<ColumnSample[]> {
	const all: ColumnSample[] = [];
	for (const [file, draft] of drafts.entries()) {
		if (draft.plan.kind === 'events') continue;
		const samples = draft.plan.kind === 'long' ? await longSamples(draft, file, ctx) : wideSamples(draft, file, ctx);
		const wanted =
			draft.plan.kind === 'per-signal' ? samples.filter((s) => s.index === draft.plan.roles.value) : samples;
		planColumns(draft, wanted, ctx);
		all.push(...wanted);
	}
	return all;
}

type Judged = { guesses: Guess[]; choices: Choice[]; problems: Problem[] };

function judgeColumns(samples: readonly ColumnSample[], fileOf: (i: number) => string, ctx: ReadContext): Judged {
	const { guesses, system, systemSure } = guessColumns(samples, ctx);
	settleRivals(guesses);
	const problems = findDuplicates(guesses, fileOf);
	problems.push(...checkRelations(guesses, fileOf), ...findDead(guesses, fileOf));
	checkRunning(guesses);
	confirmSaturations(guesses);
	const choices = settlePressures(guesses, ctx);
	const answer = ctx.answers?.['temperature-unit'];
	const open = guesses.filter((g) => g.signal && SIGNALS[g.signal].quantity === 'temperature' && !g.sample.unit);
	if (answer === 'degF' || answer === 'degC') for (const g of open) g.measure = answer;
	const first = open[0];
	if (first) {
		const sample = `${first.sample.column} ${first.sample.shape.median}`;
		choices.push({
			key: 'temperature-unit',
			question: 'The temperatures carry no unit. Are they °F or °C?',
			chosen: answer ?? (system === 'si' ? 'degC' : 'degF'),
			options: [
				{ value: 'degF', label: '°F', sample: `${sample} °F` },
				{ value: 'degC', label: '°C', sample: `${sample} °C` }
			],
			sure: answer !== undefined || systemSure
		});
	}
	return { guesses, choices, problems };
}

/**
 * The unit a remembered column goes to. A shape that was all one unit's is that of the unit the log came to: sister
 * machines export alike. Only a shape that several units shared keeps its units, as far as they are at this site still.
 */
function ownerOf(known: ColumnMapping, remembered: RememberedMapping, ctx: ReadContext): UnitRef {
	const units = new Set(remembered.mapping.filter((m) => m.signal !== null).map((m) => m.unitId));
	const found = units.size > 1 ? ctx.siblings.find((u) => u.unitId === known.unitId) : undefined;
	return found ?? ctx.unit;
}

function applyRemembered(entry: ColumnMapping, remembered: RememberedMapping | null, ctx: ReadContext): ColumnMapping {
	const known = remembered ? recallColumn(remembered, entry.file, entry.column) : null;
	if (!remembered || !known) return entry;
	const unit = ownerOf(known, remembered, ctx);
	// Another site may have set the same controller to other units: what this log shows itself comes first.
	const shown = remembered.elsewhere && entry.signal === known.signal ? entry.unitOfMeasure : null;
	const unitOfMeasure =
		shown ?? (known.unitOfMeasure && isMeasureKey(known.unitOfMeasure) ? known.unitOfMeasure : null);
	return {
		...entry,
		signal: known.signal,
		circuit: Number(known.circuit) <= unit.circuits ? known.circuit : entry.circuit,
		unitId: unit.unitId,
		unitOfMeasure,
		confidence: 1,
		confirmed: true
	};
}

/** What goes on when nobody is asked: guesses that are not sure are left out. */
function autoMapping(entry: ColumnMapping): ColumnMapping {
	return entry.confirmed || entry.confidence >= SURE ? entry : { ...entry, signal: null, unitOfMeasure: null };
}

async function inspectUnpacked(unpacked: Unpacked, ctx: ReadContext): Promise<Inspection> {
	let { drafts, problems } = await draftAll(unpacked, ctx);
	if (drafts.length === 0) return refused(problems);
	const signature = headerSignature(drafts);
	const remembered = recall(signature, ctx);
	const answers = { ...settledElsewhere(drafts), ...remembered?.choices, ...ctx.answers };
	const open = drafts.some((d) => d.choices.some((c) => !c.sure));
	if (open && Object.keys(answers).length > Object.keys(ctx.answers ?? {}).length) {
		({ drafts, problems } = await draftAll(unpacked, { ...ctx, answers }));
	}
	for (const draft of drafts) namePerSignal(draft);
	const fileOf = (i: number) => drafts[i]?.plan.file ?? '';
	const samples = await gather(drafts, ctx);
	const judged = judgeColumns(samples, fileOf, { ...ctx, answers });
	problems.push(...judged.problems);
	const onlyEvents = drafts.every((d) => d.plan.kind === 'events');
	if (!onlyEvents && !remembered && nothingKnown(judged.guesses)) {
		const first = drafts[0];
		const columns = judged.guesses.slice(0, 6).map((g) => `"${g.sample.column}"`);
		const message = `No column of ${fileOf(0)} is a signal of a chiller that is known here (${columns.join(', ')}).`;
		return refused([
			...problems,
			{ file: fileOf(0), line: first?.plan.headerLine || null, column: null, kind: 'no-known-signal', message }
		]);
	}
	const choices = [...mergeChoices(drafts), ...judged.choices];
	const questions =
		onlyEvents || remembered
			? choices.filter((c) => !c.sure).map((c) => c.question)
			: openQuestions(judged.guesses, choices, new Set(), ctx.ask);
	if (ctx.ask && !remembered && questions.length === 0 && !onlyEvents)
		questions.push('Is every column what it is taken for?');
	const rows = [0, 1, 2].map((k) => Math.floor((k * Math.max(0, (drafts[0]?.headRows ?? 1) - 1)) / 2));
	const entries = judged.guesses.map((g) => applyRemembered(entryOf(g, fileOf(g.sample.file)), remembered, ctx));
	return {
		decision: questions.length > 0 ? 'needs-mapping' : 'ready',
		questions,
		layout: layoutOf(drafts),
		files: drafts.map((d) => d.plan),
		columns: judged.guesses.map((g, i) => inspected(g, entries[i] ?? entryOf(g, ''), rows)),
		lines: rows.map((i) => drafts[0]?.rows[i]?.line ?? 0),
		choices,
		problems,
		headerSignature: signature,
		mapping: entries.map(autoMapping)
	};
}

/**
 * Looks at an upload: what its files are, how they are read, what each column is taken for, and what a person must
 * answer. Never throws for a bad log: the answer is then `refused`, with its problems.
 */
export async function inspectLog(files: readonly SourceFile[], ctx: ReadContext): Promise<Inspection> {
	let unpacked: Unpacked | null = null;
	try {
		unpacked = await unpack(files);
		return await inspectUnpacked(unpacked, ctx);
	} catch (error) {
		if (!(error instanceof LogRefusal)) throw error;
		return refused([{ file: error.file, line: error.line, column: null, kind: error.kind, message: error.message }]);
	} finally {
		await unpacked?.close();
	}
}
