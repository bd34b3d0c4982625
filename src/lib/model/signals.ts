import type { Quantity } from './quantities';

/** The ink a quantity is drawn in (see app.css). */
export type Family = 'load' | 'low' | 'water' | 'high' | 'oil' | 'electrical';

/** How a signal's records behave: measured, on/off, a running total, or words. */
export type SignalForm = 'analogue' | 'binary' | 'counter' | 'text';

export type SignalInfo = {
	/** The trade's words, as on a label: "leaving water". */
	label: string;
	quantity: Quantity;
	form: SignalForm;
	/** Belongs to one refrigerant circuit, or to the whole unit. */
	scope: 'circuit' | 'unit';
	family: Family;
};

function signal(
	label: string,
	quantity: Quantity,
	family: Family,
	scope: 'circuit' | 'unit' = 'circuit',
	form: SignalForm = quantity === 'state' ? 'binary' : quantity === 'text' ? 'text' : 'analogue'
): SignalInfo {
	return { label, quantity, form, scope, family };
}

/** Every signal the product knows, by its own key (schema, API and code use these and no others). */
export const SIGNALS = {
	running: signal('running', 'state', 'load'),
	startCommand: signal('start command', 'state', 'load'),
	unitMode: signal('unit mode', 'text', 'load', 'unit'),
	activeLimit: signal('active limit', 'text', 'load'),
	demand: signal('demand', 'percent', 'load'),
	capacity: signal('capacity', 'percent', 'load'),
	speed: signal('speed', 'frequency', 'load'),
	motorCurrent: signal('motor current', 'current', 'electrical'),
	power: signal('power', 'power', 'electrical'),
	phaseCurrents: signal('phase currents', 'current', 'electrical'),
	phaseVoltages: signal('phase voltages', 'voltage', 'electrical'),
	windingTemp: signal('winding temperature', 'temperature', 'electrical'),
	evapSaturation: signal('evaporator saturation', 'temperature', 'low'),
	evapPressure: signal('evaporator pressure', 'pressure', 'low'),
	suctionTemp: signal('suction temperature', 'temperature', 'low'),
	evapWaterIn: signal('entering water', 'temperature', 'water', 'unit'),
	evapWaterOut: signal('leaving water', 'temperature', 'water', 'unit'),
	waterSetpoint: signal('water setpoint', 'temperature', 'water', 'unit'),
	evapFlow: signal('evaporator flow', 'flow', 'water', 'unit'),
	evapFlowProof: signal('evaporator flow proof', 'state', 'water', 'unit'),
	evapPumpRun: signal('evaporator pump', 'state', 'water', 'unit'),
	evapLevel: signal('evaporator level', 'percent', 'low'),
	condSaturation: signal('condensing saturation', 'temperature', 'high'),
	condPressure: signal('condenser pressure', 'pressure', 'high'),
	dischargeTemp: signal('discharge temperature', 'temperature', 'high'),
	dischargePressure: signal('discharge pressure', 'pressure', 'high'),
	liquidTemp: signal('liquid temperature', 'temperature', 'high'),
	condWaterIn: signal('condenser water entering', 'temperature', 'water', 'unit'),
	condWaterOut: signal('condenser water leaving', 'temperature', 'water', 'unit'),
	condFlow: signal('condenser flow', 'flow', 'water', 'unit'),
	condFlowProof: signal('condenser flow proof', 'state', 'water', 'unit'),
	condPumpRun: signal('condenser pump', 'state', 'water', 'unit'),
	condAirIn: signal('condenser air entering', 'temperature', 'high', 'unit'),
	fanStage: signal('fan stage', 'percent', 'high', 'unit'),
	condLevel: signal('condenser level', 'percent', 'high'),
	oilTemp: signal('oil temperature', 'temperature', 'oil'),
	oilPressure: signal('oil pressure', 'pressure', 'oil'),
	oilFilterDrop: signal('oil filter drop', 'pressureDifference', 'oil'),
	oilLevelSwitch: signal('oil level switch', 'state', 'oil'),
	oilHeater: signal('oil heater', 'state', 'oil'),
	oilPump: signal('oil pump', 'state', 'oil'),
	valvePosition: signal('valve position', 'percent', 'low'),
	economiserValve: signal('economiser valve', 'percent', 'low'),
	injection: signal('liquid injection', 'percent', 'high'),
	liquidLineSolenoid: signal('liquid-line solenoid', 'state', 'low'),
	outdoorTemp: signal('outdoor temperature', 'temperature', 'high', 'unit'),
	startsCounter: signal('starts counter', 'count', 'load', 'circuit', 'counter'),
	runHours: signal('run hours', 'hours', 'load', 'circuit', 'counter'),
	alarm: signal('alarm', 'text', 'load')
} as const satisfies Record<string, SignalInfo>;

export type SignalKey = keyof typeof SIGNALS;
export const SIGNAL_KEYS = Object.keys(SIGNALS) as readonly SignalKey[];

/** A signal that several columns may carry (phase currents) has its second and third as `key.2`, `key.3`. */
export type SeriesId = SignalKey | `${SignalKey}.${2 | 3 | 4}`;

/** Is `key` one of {@link SIGNALS}? */
export function isSignalKey(key: string): key is SignalKey {
	return Object.hasOwn(SIGNALS, key);
}

/** The signal a series belongs to. */
export function signalOf(id: SeriesId): SignalKey {
	return id.replace(/\.[234]$/, '') as SignalKey;
}

/** Quantities worked out sample by sample from two signals (method.md, "Derived"). */
export const DERIVED = {
	superheat: { label: 'superheat', quantity: 'temperatureDifference', family: 'low' },
	dischargeSuperheat: { label: 'discharge superheat', quantity: 'temperatureDifference', family: 'high' },
	subcooling: { label: 'subcooling', quantity: 'temperatureDifference', family: 'high' },
	evapApproach: { label: 'evaporator approach', quantity: 'temperatureDifference', family: 'low' },
	condApproach: { label: 'condenser approach', quantity: 'temperatureDifference', family: 'high' },
	margin: { label: 'margin', quantity: 'temperatureDifference', family: 'oil' },
	lift: { label: 'lift', quantity: 'temperatureDifference', family: 'high' },
	systemDelta: { label: 'system pressure difference', quantity: 'pressureDifference', family: 'high' },
	oilNet: { label: 'net oil pressure', quantity: 'pressureDifference', family: 'oil' },
	evapDelta: { label: 'water difference', quantity: 'temperatureDifference', family: 'water' },
	duty: { label: 'duty', quantity: 'duty', family: 'load' }
} as const satisfies Record<string, { label: string; quantity: Quantity; family: Family }>;
export type DerivedKey = keyof typeof DERIVED;
export const DERIVED_KEYS = Object.keys(DERIVED) as readonly DerivedKey[];

export type TraceKey = SignalKey | DerivedKey;
