import type { Series } from '$lib/model/series';
import { DERIVED, SIGNALS, signalOf, type DerivedKey, type SeriesId } from '$lib/model/signals';
import {
	FIGURE_KEYS,
	type AbsentReason,
	type FigureKey,
	type StartCorrection,
	type StartRecord
} from '$lib/model/start';
import type { Circuit } from '../circuit';
import { spacingWithin } from '../series/spacing';
import { readingsWithin, type Readings } from '../series/window';
import type { Run } from '../starts/runs';

export type TraceId = SeriesId | DerivedKey;

/** One start while its figures are read. */
export type FigureContext = {
	circuit: Circuit;
	run: Run;
	startedAt: number;
	/** The start as the log shows it, before a person's correction. */
	observedAt: number;
	correction: StartCorrection | null;
	/** First off sample; where the stop was not seen, the last running reading. ms */
	stop: number;
	/** True when the stop was seen, so that "30 s before the stop" means something. */
	stopped: boolean;
	/** Seconds from the start to the stop. */
	seconds: number;
	/** Start-up window, s. */
	window: number;
	spacing: number;
	restSeconds: number | null;
};

export type Figures = Pick<StartRecord, 'figures' | 'absent' | 'marks'>;

/** An empty sheet: every figure null, no reason yet. */
export function emptyFigures(): Figures {
	const figures = Object.fromEntries(FIGURE_KEYS.map((key) => [key, null])) as Record<FigureKey, number | null>;
	return { figures, absent: {}, marks: {} };
}

/** Writes a figure, or why it is absent. */
export function put(sheet: Figures, key: FigureKey, value: number | Absence): void {
	if (typeof value === 'number' && Number.isFinite(value)) {
		sheet.figures[key] = value;
		delete sheet.absent[key];
	} else {
		sheet.figures[key] = null;
		sheet.absent[key] = typeof value === 'number' ? absence('cannot-tell', 'The reading is not a number.') : value;
	}
}

export type Absence = { reason: AbsentReason; detail: string };

/** An absence with its sentence. */
export function absence(reason: AbsentReason, detail: string): Absence {
	return { reason, detail };
}

/** The label of a signal or derived quantity, as the product writes it. */
export function labelOf(id: TraceId): string {
	return id in DERIVED ? DERIVED[id as DerivedKey].label : SIGNALS[signalOf(id as SeriesId)].label;
}

/**
 * Readings of a quantity from `from` to `to` seconds after the start, both inclusive, while it ran (running samples
 * only: the first off sample is no longer the run). @returns an absence when there are fewer than `least`
 */
export function during(
	context: FigureContext,
	id: TraceId,
	from: number,
	to: number,
	least = 1
): (Readings & { series: Series }) | Absence {
	const series = context.circuit.trace(id);
	if (series === undefined) return missing(context, id);
	const end = Math.min(context.startedAt + to * 1000, context.run.lastOn);
	const begin = context.startedAt + from * 1000;
	if (begin > end) return shortRun(context, from);
	const readings = readingsWithin(series, begin, end);
	if (readings.v.length >= least) return { ...readings, series };
	return tooFew(context, id, series, begin, end, least);
}

/** The log has no readings of it: which parts are missing. */
export function missing(context: FigureContext, id: TraceId): Absence {
	const { circuit } = context;
	if (id === 'margin' && circuit.saturations.sideUnknown && circuit.trace('oilTemp') !== undefined) {
		return absence(
			'cannot-tell',
			'The logged condensing saturation may be dew or bubble, and they lie over 0.5 K apart.'
		);
	}
	const parts = id in DERIVED ? PARTS[id as DerivedKey].filter((part) => circuit.trace(part) === undefined) : [id];
	const names = (parts.length > 0 ? parts : [id]).map(labelOf).join(' and ');
	return absence('signal-missing', `The log has no ${names}.`);
}

const PARTS: Readonly<Record<DerivedKey, readonly SeriesId[]>> = {
	superheat: ['suctionTemp', 'evapSaturation'],
	dischargeSuperheat: ['dischargeTemp', 'condSaturation'],
	subcooling: ['condSaturation', 'liquidTemp'],
	evapApproach: ['evapWaterOut', 'evapSaturation'],
	condApproach: ['condSaturation', 'condWaterOut'],
	margin: ['oilTemp', 'condSaturation'],
	lift: ['condSaturation', 'evapSaturation'],
	systemDelta: ['condPressure', 'evapPressure'],
	oilNet: ['oilPressure', 'evapPressure'],
	evapDelta: ['evapWaterIn', 'evapWaterOut'],
	duty: ['evapFlow', 'evapWaterIn', 'evapWaterOut']
};

/** The run ended before the figure's window. */
export function shortRun(context: FigureContext, from: number): Absence {
	return absence(
		'run-too-short',
		`It ran ${Math.round(context.seconds)} s; this is read from ${Math.round(from)} s on.`
	);
}

function tooFew(
	context: FigureContext,
	id: TraceId,
	series: Series,
	begin: number,
	end: number,
	least: number
): Absence {
	const spacing = spacingWithin(series, begin - 600_000, end + 600_000);
	const name = labelOf(id);
	if (spacing === null) return absence('gap', `The log has no readings of ${name} around this start.`);
	if (((end - begin) / 1000 / spacing + 1) * 0.999 < least) {
		return absence('too-coarse', `The log has ${name} every ${Math.round(spacing)} s, too far apart for this figure.`);
	}
	return absence('gap', `The log has a gap in ${name} where this is read.`);
}
