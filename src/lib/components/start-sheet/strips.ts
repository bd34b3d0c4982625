import type { Quantity } from '$lib/model/quantities';
import { DERIVED, isSignalKey, SIGNALS, type TraceKey } from '$lib/model/signals';
import type { FigureKey } from '$lib/model/start';
import type { LimitKey, UnitNature } from '$lib/model/unit';

/** A limit line of a strip. `edge` marks the side that is out of bounds; `trip` limits are inked as such. */
export type StripLimit = {
	key: LimitKey;
	name: string;
	kind: 'trip' | 'usual';
	edge: 'below' | 'above';
	always?: boolean;
};

export type StripTrace = {
	key: TraceKey;
	/** As on the label, in few words. */
	label: string;
	/** For the read-out of a phone, where the label is too long. */
	short?: string;
	/** Drawn thin, as a companion of the strip's own traces. */
	faint?: boolean;
};

/** One strip of the start sheet. */
export type StripSpec = {
	key: string;
	name: string;
	quantity: Quantity;
	/** px at a wide sheet and on a phone */
	height: number;
	phoneHeight: number;
	traces: StripTrace[];
	/** Read out at the cursor without a line of their own. */
	readOnly: StripTrace[];
	limits: StripLimit[];
	/** A usual range, drawn as a wash between two limits. */
	band?: { low: LimitKey; high: LimitKey; name: string };
	/** An axis that does not follow the readings, in stored units. */
	fixed?: { low: number; high: number };
	/** The least span worth drawing, stored units. */
	least: number;
	/** What the strip says when none of its signals is in the log. */
	wouldShow: string;
	/** Shown only where the log could give one of these figures; the other strips keep their place without a signal. */
	onlyWith?: readonly FigureKey[];
};

const trace = (key: TraceKey, label: string, faint = false): StripTrace =>
	faint ? { key, label, faint } : { key, label };
const lower = (key: LimitKey, name: string, kind: StripLimit['kind'] = 'trip', always = false): StripLimit => ({
	key,
	name,
	kind,
	edge: 'below',
	always
});
const upper = (key: LimitKey, name: string, kind: StripLimit['kind'] = 'trip'): StripLimit => ({
	key,
	name,
	kind,
	edge: 'above'
});

/** What the achieved loading is called on this machine. */
function capacityLabel(nature: UnitNature): string {
	if (nature.capacityControl === 'slide') return 'slide';
	if (nature.capacityControl === 'vanes') return 'vanes';
	return nature.capacityControl === 'steps' ? 'steps' : 'capacity';
}

/** The strips of a start sheet, top to bottom. The strip that tells most of a start gets the height. */
export function stripsFor(nature: UnitNature): StripSpec[] {
	const air = nature.condenser === 'air' || nature.condenser === 'evaporative';
	return [
		{
			key: 'loading',
			name: 'Loading',
			quantity: 'percent',
			height: 70,
			phoneHeight: 62,
			traces: [trace('demand', 'demand'), trace('capacity', capacityLabel(nature))],
			readOnly: [trace('speed', 'speed')],
			limits: [],
			band: { low: 'startCapacityUsualLow', high: 'startCapacityUsualHigh', name: 'usual at start' },
			fixed: { low: 0, high: 108 },
			least: 100,
			wouldShow: 'how far the compressor was loaded in the first seconds, and whether it stalled'
		},
		{
			key: 'low-side',
			name: 'Low side',
			quantity: 'temperature',
			height: 118,
			phoneHeight: 128,
			traces: [
				trace('evapWaterIn', 'entering water', true),
				{ ...trace('evapWaterOut', 'leaving water'), short: 'water out' },
				{ ...trace('evapSaturation', 'evap. saturation'), short: 'evap. sat.' }
			],
			readOnly: [trace('evapApproach', 'approach'), trace('evapDelta', 'water difference')],
			limits: [
				lower('evapSaturationCutout', 'cut-out', 'trip', true),
				lower('leavingWaterCutout', 'leaving-water cut-out'),
				lower('freezeLimit', 'freeze limit')
			],
			least: 8,
			wouldShow: 'how far the evaporator fell, against the water that leaves it'
		},
		{
			key: 'condenser',
			name: 'Condenser',
			quantity: 'temperature',
			height: 130,
			phoneHeight: 128,
			traces: [
				trace('evapSaturation', 'evap. saturation', true),
				air ? trace('condAirIn', 'air entering') : trace('condWaterIn', 'entering'),
				...(air ? [] : [trace('condWaterOut', 'leaving')]),
				trace('condSaturation', 'condensing')
			],
			readOnly: [trace('condApproach', 'approach')],
			limits: [upper('condSaturationCutout', 'condensing cut-out'), lower('condWaterLeast', 'least entering', 'usual')],
			least: 8,
			wouldShow: 'whether condensing rose with the load, and how cold the condenser was'
		},
		{
			key: 'lift',
			name: 'Lift',
			quantity: 'temperatureDifference',
			height: 62,
			phoneHeight: 72,
			traces: [trace('lift', 'lift')],
			readOnly: [],
			limits: [],
			least: 10,
			wouldShow: 'how soon the compressor built lift'
		},
		{
			key: 'oil',
			name: 'Oil',
			quantity: 'temperature',
			height: 46,
			phoneHeight: 62,
			traces: [trace('oilTemp', 'oil')],
			readOnly: [],
			limits: [upper('oilTempCutout', 'oil cut-out'), upper('oilTempUsualHigh', 'usual upper end', 'usual')],
			least: 10,
			wouldShow: 'how warm the oil was'
		},
		{
			key: 'margin',
			name: 'Margin',
			quantity: 'temperatureDifference',
			height: 44,
			phoneHeight: 62,
			traces: [trace('margin', 'margin')],
			readOnly: [],
			limits: [
				lower('marginCutout', 'oil margin cut-out'),
				lower('lineRestrictionMargin', 'line restriction below', 'usual')
			],
			least: 10,
			wouldShow: 'how far the oil stood above condensing'
		},
		{
			key: 'valve',
			name: 'Valve',
			quantity: 'percent',
			height: 42,
			phoneHeight: 62,
			traces: [trace('valvePosition', 'valve')],
			readOnly: [],
			limits: [],
			fixed: { low: 0, high: 105 },
			least: 100,
			wouldShow: 'whether the valve opened to the dive, lagged, or stood at its limit'
		},
		{
			key: 'superheat',
			name: 'Superheat',
			quantity: 'temperatureDifference',
			height: 58,
			phoneHeight: 72,
			traces: [trace('dischargeSuperheat', 'discharge'), trace('superheat', 'superheat')],
			readOnly: [trace('subcooling', 'subcooling')],
			limits: [],
			least: 6,
			wouldShow: 'whether the evaporator was starved or flooded'
		},
		{
			key: 'pressures',
			name: 'Pressures',
			quantity: 'pressureDifference',
			height: 54,
			phoneHeight: 62,
			traces: [trace('systemDelta', 'system difference'), trace('oilNet', 'net oil pressure')],
			readOnly: [],
			limits: [lower('oilNetCutout', 'oil pressure cut-out'), lower('systemDeltaCutout', 'least difference')],
			least: 50,
			wouldShow: 'whether the pressure that moves the oil was built in time',
			onlyWith: ['systemDeltaAt60s', 'minOilNet']
		},
		{
			key: 'flow',
			name: 'Flow',
			quantity: 'flow',
			height: 46,
			phoneHeight: 62,
			traces: [trace('condFlow', 'condenser flow'), trace('evapFlow', 'evaporator flow')],
			readOnly: [],
			limits: [],
			least: 5,
			wouldShow: 'how much water flowed',
			onlyWith: ['flow']
		},
		{
			key: 'current',
			name: 'Current',
			quantity: 'current',
			height: 48,
			phoneHeight: 62,
			traces: [trace('motorCurrent', 'motor current')],
			readOnly: [trace('power', 'power')],
			limits: [],
			least: 20,
			wouldShow: 'the load as the motor felt it'
		}
	];
}

/**
 * The strips worth their place for one start, known before its traces arrive, so that nothing moves when they do.
 * @param absentReasons why figures of the start are null; `signal-missing` means that the log has no such signal
 */
export function stripsOfStart(nature: UnitNature, absentReasons: Readonly<Record<string, string>>): StripSpec[] {
	const could = (figure: FigureKey) => absentReasons[figure] !== 'signal-missing';
	return stripsFor(nature).filter(({ onlyWith }) => onlyWith === undefined || onlyWith.some(could));
}

/** Every signal and derived quantity that the strips ask for, once each. */
export function tracesOf(strips: readonly StripSpec[]): TraceKey[] {
	return [...new Set(strips.flatMap((strip) => [...strip.traces, ...strip.readOnly].map(({ key }) => key)))];
}

/** Why a strip is empty, as a sentence that names every signal it would draw. */
export function missingWords(spec: StripSpec): string {
	const keys = spec.traces.filter(({ faint }) => !faint).map(({ key }) => key);
	const names = keys.map((key) => (isSignalKey(key) ? SIGNALS[key].label : DERIVED[key].label));
	const list = [names.slice(0, -1).join(', '), names.at(-1) ?? ''].filter((part) => part !== '').join(' and ');
	const said = list.charAt(0).toUpperCase() + list.slice(1);
	const logged = keys.every(isSignalKey);
	if (logged) return `${said} ${names.length === 1 ? 'is' : 'are'} not in this log.`;
	return `${said} cannot be worked out: a signal that is needed is not in this log.`;
}
