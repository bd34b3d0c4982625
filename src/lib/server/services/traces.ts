import { AppError } from '$lib/model/errors';
import type { Actor } from '$lib/model/people';
import { apiMeasure, fromStored, MEASURES, type Quantity, type UnitSystem } from '$lib/model/quantities';
import type { Series, SeriesMap } from '$lib/model/series';
import { DERIVED, DERIVED_KEYS, isSignalKey, SIGNALS, type DerivedKey, type TraceKey } from '$lib/model/signals';
import { READING_SCHEMAS } from '$lib/model/wire/field';
import type { Traces } from '$lib/model/wire/views';
import { reduceTrace } from '$lib/server/analysis/reduce';
import { deriveSeries, saturationsOf } from '$lib/server/analysis/series/derived';
import { firstAtOrAfter, lastAtOrBefore } from '$lib/server/analysis/series/search';
import { isGapBefore, spacingWithin } from '$lib/server/analysis/series/spacing';
import { hasReadings } from '$lib/server/analysis/series/window';
import type { Window } from '$lib/server/repositories/blocks';
import { listChanges, listChecks } from '$lib/server/repositories/circle';
import type { UnitRow } from '$lib/server/repositories/plant';
import { listStarts, type StartRow } from '$lib/server/repositories/starts';
import { withOrganisation, type Tx } from '$lib/server/repositories/transaction';
import type { BinaryTraces } from '$lib/utils/traces-binary';
import { circuitsOf } from './analysing';
import { loadEvents, loadSeries, loadTexts } from './series';
import { iso, unitsObject } from './start-shapes';
import { visibleStart } from './starts';
import { visibleUnit } from './units';

const HOUR = 3_600_000;
const MOST_PX = 20_000;

export type TraceQuery = { signals?: string; px?: number };

const isDerived = (key: string): key is DerivedKey => Object.hasOwn(DERIVED, key);

/** The signals asked for. @throws AppError `invalid` that names one that is none */
function keysOf(signals: string | undefined, map: SeriesMap): TraceKey[] {
	if (!signals) {
		const logged = (Object.keys(map) as string[]).filter(isSignalKey).filter((key) => SIGNALS[key].form !== 'text');
		return [...logged, ...DERIVED_KEYS];
	}
	return signals.split(',').map((key) => {
		const name = key.trim();
		if (isSignalKey(name) || isDerived(name)) return name;
		throw new AppError('invalid', `“${name}” is no signal.`, { errors: [{ field: 'signals', message: name }] });
	});
}

/** Readings of a window, with a break where a gap lies and one held reading before it for change-of-value columns. */
function windowOf(series: Series, { from, to }: Window): { t: Float64Array; v: Float64Array; gaps: Window[] } {
	let first = firstAtOrAfter(series.t, from);
	const end = lastAtOrBefore(series.t, to);
	if (series.logging === 'change' && first > 0) first--;
	const t: number[] = [];
	const v: number[] = [];
	const gaps: Window[] = [];
	for (let i = first; i <= end; i++) {
		const at = series.t[i] ?? NaN;
		if (i > first && series.logging === 'interval' && isGapBefore(series.t, i)) {
			const before = series.t[i - 1] ?? NaN;
			t.push((before + at) / 2);
			v.push(NaN);
			gaps.push({ from: before, to: at });
		}
		t.push(at);
		v.push(series.v[i] ?? NaN);
	}
	return { t: Float64Array.from(t), v: Float64Array.from(v), gaps };
}

function quantityOf(key: TraceKey): Quantity {
	return isDerived(key) ? DERIVED[key].quantity : SIGNALS[key].quantity;
}

/** One trace in the units of the answer, thinned to the width it is drawn at. */
function traceOf(
	key: TraceKey,
	series: Series,
	window: Window,
	px: number,
	system: UnitSystem
): { trace: BinaryTraces['traces'][number]; gaps: Window[] } {
	const quantity = quantityOf(key);
	const cut = windowOf(series, window);
	const { t, v } = reduceTrace(cut.t, cut.v, px);
	const rated = series.measure === 'pctRated';
	const measure = rated ? 'pctRated' : apiMeasure(quantity, system);
	const values = new Float32Array(v.length);
	for (let i = 0; i < v.length; i++) values[i] = fromStored(v[i] ?? NaN, measure);
	const label = isDerived(key) ? DERIVED[key].label : SIGNALS[key].label;
	const trace = {
		signal: key,
		label,
		quantity,
		measure: MEASURES[measure].symbol,
		logging: series.logging,
		derived: isDerived(key),
		t,
		v: values
	};
	return { trace, gaps: cut.gaps };
}

type Source = { tx: Tx; unit: UnitRow; circuit: string; window: Window; system: UnitSystem };

async function tracesOf({ tx, unit, circuit, window, system }: Source, query: TraceQuery): Promise<BinaryTraces> {
	const wide = { from: window.from - HOUR, to: window.to + HOUR };
	const map = (await loadSeries(tx, unit.id, circuitsOf(unit), { window: wide })).get(circuit) ?? {};
	const saturations = saturationsOf(map, unit.refrigerant);
	const px = Math.max(50, Math.min(MOST_PX, query.px ?? 1200));
	const traces: BinaryTraces['traces'] = [];
	const missing: string[] = [];
	let gaps: Window[] = [];
	let spacing: number | null = null;
	for (const key of keysOf(query.signals, map)) {
		const series = isDerived(key)
			? deriveSeries(key, map, saturations, unit.nature)
			: (map[key] ??
				(key === 'evapSaturation' ? saturations.evap : key === 'condSaturation' ? saturations.condDew : undefined));
		if (!hasReadings(series)) {
			if (query.signals) missing.push(key);
			continue;
		}
		const made = traceOf(key, series, window, px, system);
		traces.push(made.trace);
		if (!isDerived(key) && made.gaps.length > 0 && gaps.length === 0) gaps = made.gaps;
		if (!isDerived(key) && series.logging === 'interval')
			spacing = Math.min(spacing ?? Infinity, spacingWithin(series, window.from, window.to) ?? Infinity);
	}
	return {
		from: iso(window.from),
		to: iso(window.to),
		spacingSeconds: spacing === Infinity ? null : spacing,
		traces,
		gaps: gaps.map((gap) => ({ from: iso(gap.from), to: iso(gap.to) })),
		marks: await marksOf({ tx, unit, circuit, window, system }),
		missing,
		units: unitsObject(system)
	};
}

const noteText = (readings: unknown): string => {
	const note = READING_SCHEMAS.note.safeParse(readings);
	return note.success ? note.data.text : '';
};

/** Starts, trips, stops, alarms, changes and notes inside the window, in time order. */
async function marksOf({ tx, unit, circuit, window }: Source): Promise<Traces['marks']> {
	const marks: Traces['marks'] = [];
	const add = (kind: Traces['marks'][number]['kind'], at: number, text: string): void => {
		if (at >= window.from && at <= window.to) marks.push({ kind, at: iso(at), text });
	};
	const starts = await listStarts(tx, [unit.id], { from: window.from - 48 * HOUR, to: window.to, circuit });
	for (const { record } of starts) {
		add('start', record.startedAt, 'start');
		if (record.trip) add('trip', record.trip.at, record.trip.kind);
		else if (record.endedAt !== null) add('stop', record.endedAt, 'stop');
	}
	for (const event of await loadEvents(tx, unit.id, circuit, window)) add('alarm', event.at, event.text);
	const alarm = (await loadTexts(tx, unit.id, [circuit], window)).get(circuit)?.alarm;
	alarm?.text.forEach((text, i) => {
		if (text !== '' && text !== alarm.text[i - 1]) add('alarm', alarm.t[i] ?? NaN, text);
	});
	for (const change of await listChanges(tx, unit.id)) add('change', change.at.getTime(), change.text);
	for (const check of await listChecks(tx, unit.id)) {
		const here = check.circuit === null || check.circuit === circuit;
		if (check.kind === 'note' && here) add('note', check.at.getTime(), noteText(check.readings));
	}
	return marks.sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0));
}

/** Where a start's traces begin and end: seconds before it, and after it (by default its run and two minutes more). */
function startWindow(row: StartRow, before: number | undefined, after: number | undefined): Window {
	const run = ((row.endedAt ?? row.startedAt + 40 * 60_000) - row.startedAt) / 1000;
	return {
		from: row.startedAt - (before ?? 60) * 1000,
		to: row.startedAt + (after ?? Math.min(run + 120, 4 * 3600)) * 1000
	};
}

/** The traces around one start. */
export async function startTraces(
	actor: Actor,
	startId: string,
	query: TraceQuery & { before?: number; after?: number },
	system: UnitSystem
): Promise<BinaryTraces> {
	return withOrganisation(actor.organisationId, async (tx) => {
		const { row, unit } = await visibleStart(tx, actor, startId);
		const window = startWindow(row, query.before, query.after);
		return tracesOf({ tx, unit, circuit: row.circuit, window, system }, query);
	});
}

/** The traces of any window of a unit's circuit. @throws AppError `invalid` when the window is none */
export async function unitTraces(
	actor: Actor,
	unitId: string,
	query: TraceQuery & { from: string; to: string; circuit?: string },
	system: UnitSystem
): Promise<BinaryTraces> {
	const window = { from: Date.parse(query.from), to: Date.parse(query.to) };
	if (!(window.from < window.to)) throw new AppError('invalid', '“from” must be before “to”.');
	return withOrganisation(actor.organisationId, async (tx) => {
		const { unit } = await visibleUnit(tx, actor, unitId);
		return tracesOf({ tx, unit, circuit: query.circuit ?? '1', window, system }, query);
	});
}

/** Traces with plain arrays, for JSON. */
export function plainTraces(traces: BinaryTraces): Traces {
	return {
		...traces,
		traces: traces.traces.map((trace) => ({
			...trace,
			t: [...trace.t],
			v: [...trace.v].map((value) => (Number.isNaN(value) ? null : value))
		}))
	};
}
