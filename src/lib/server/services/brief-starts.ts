import type { Actor } from '$lib/model/people';
import { fromStored, MEASURES, pageMeasure, type UnitSystem } from '$lib/model/quantities';
import { DERIVED, SIGNALS, type TraceKey } from '$lib/model/signals';
import type { TripKind } from '$lib/model/start';
import { limitAt, type LimitHistory, type LimitKey } from '$lib/model/unit';
import type { Brief, BriefStart } from '$lib/model/wire/visit';
import { OUTCOME_WORDS } from '$lib/model/words';
import type { StartRow } from '$lib/server/repositories/starts';
import { valueTicks } from '$lib/utils/axis-ticks';
import { shortDate, siteClock, siteDate } from './site-clock';
import { startTraces } from './traces';

/** The most telling starts of a brief, as small pictures with one axis: the latest trip and the nearest held ones. */

/** The two signals that tell most of each kind of trip, and the limit drawn with them. */
const TELLING: Partial<Record<TripKind, { signals: readonly TraceKey[]; limit: LimitKey | null }>> = {
	'low-leaving-water': { signals: ['evapWaterOut', 'evapWaterIn'], limit: 'leavingWaterCutout' },
	'loss-of-water-flow': { signals: ['evapWaterOut', 'evapWaterIn'], limit: null },
	'oil-flow': { signals: ['oilTemp', 'condSaturation'], limit: null },
	'high-oil-temperature': { signals: ['oilTemp', 'condSaturation'], limit: 'oilTempCutout' },
	'high-condensing': { signals: ['condSaturation', 'condWaterIn'], limit: 'condSaturationCutout' },
	'high-discharge-temperature': { signals: ['dischargeTemp', 'condSaturation'], limit: 'dischargeTempCutout' }
};
const USUAL = { signals: ['evapSaturation', 'evapWaterOut'], limit: 'evapSaturationCutout' } as const;
const BEFORE_SECONDS = 30;
const LEAST_SECONDS = 120;
const MOST_SECONDS = 1800;
const PX = 320;

/** The latest unattended start-up trip, the held start of its episode or day, and the latest held first start. */
export function tellingStarts(rows: readonly StartRow[]): StartRow[] {
	const own = rows.filter(({ record }) => !record.attended);
	const trip = own.filter(({ record }) => record.startupTrip).at(-1);
	const held = own.filter(({ outcome }) => outcome === 'held');
	if (!trip) return held.slice(-2);
	const next = held.find(({ startedAt }) => startedAt > trip.startedAt && startedAt < trip.startedAt + 12 * 3_600_000);
	const first = held.filter((row) => row.record.firstStart && row !== next).at(-1);
	return [trip, ...(next ? [next] : []), ...(first ? [first] : [])];
}

const labelOf = (key: TraceKey) =>
	key in SIGNALS ? SIGNALS[key as keyof typeof SIGNALS] : DERIVED[key as keyof typeof DERIVED];

/** Pictures of some starts with a common axis; none when their signals are not logged. */
export async function briefStarts(
	actor: Actor,
	rows: readonly StartRow[],
	limits: LimitHistory,
	timeZone: string,
	system: UnitSystem
): Promise<Pick<Brief, 'starts' | 'axis'>> {
	const chosen = tellingStarts(rows);
	const trip = chosen.find(({ record }) => record.trip);
	const { signals, limit } = TELLING[trip?.record.trip?.kind ?? 'unknown'] ?? USUAL;
	const toTrip = trip?.record.trip ? (trip.record.trip.at - trip.startedAt) / 1000 : 300;
	const toSeconds = Math.min(MOST_SECONDS, Math.max(LEAST_SECONDS, Math.ceil((toTrip * 1.4) / 60) * 60));
	const measure = pageMeasure('temperature', system);
	const starts: BriefStart[] = [];
	for (const row of chosen) {
		const query = { signals: signals.join(','), px: PX, before: BEFORE_SECONDS, after: toSeconds };
		const { traces } = await startTraces(actor, row.id, query, system);
		if (traces.length === 0) continue;
		const cutout = limit ? limitAt(limits, limit, row.startedAt) : null;
		starts.push({
			startId: row.id,
			at: new Date(row.startedAt).toISOString(),
			clock: siteClock(row.startedAt, timeZone),
			day: shortDate(siteDate(row.startedAt, timeZone)),
			outcome: row.outcome,
			text: OUTCOME_WORDS[row.outcome],
			traces: traces.map((trace) => ({
				signal: trace.signal,
				label: trace.label,
				family: labelOf(trace.signal as TraceKey).family,
				t: [...trace.t].map((at) => (at - row.startedAt) / 1000),
				v: [...trace.v].map((value) => (Number.isNaN(value) ? null : value))
			})),
			tripAt: row.record.trip ? (row.record.trip.at - row.startedAt) / 1000 : null,
			cutout: cutout ? fromStored(cutout.value, measure) : null
		});
	}
	const values = starts.flatMap((start) => [
		...start.traces.flatMap(({ t, v }) => v.filter((value, i) => value !== null && (t[i] ?? 0) <= toSeconds)),
		...(start.cutout === null ? [] : [start.cutout])
	]) as number[];
	if (values.length === 0) return { starts: [], axis: null };
	const { low, high } = valueTicks(values, 4, 2);
	return { starts, axis: { low, high, symbol: MEASURES[measure].symbol, toSeconds } };
}
