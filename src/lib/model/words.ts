import type { FigureKey, Outcome, Protection, TripKind } from './start';
import type { SuspectKey } from './suspect';
import type { LimitKey, Provenance } from './unit';

/**
 * The words that pages, briefs and reports print for the keys of the model. One table each, so that one thing has one
 * name everywhere.
 */

export const OUTCOME_WORDS: Readonly<Record<Outcome, string>> = {
	tripped: 'tripped',
	held: 'held',
	'called-off': 'called off',
	lost: 'lost',
	unclear: 'unclear'
};

/** What each outcome means, for a hover or a legend. */
export const OUTCOME_MEANINGS: Readonly<Record<Outcome, string>> = {
	tripped: 'a protection stopped it',
	held: 'outlived the start-up window and stopped normally, or still runs',
	'called-off': 'stopped normally inside the start-up window',
	lost: 'the log ends or has a gap before it can be told, or power failed',
	unclear: 'it stopped, and the log cannot say why'
};

export const TRIP_KIND_WORDS: Readonly<Record<TripKind, string>> = {
	'low-evaporator-saturation': 'low evaporator saturation',
	'low-suction-pressure': 'low suction pressure',
	'low-leaving-water': 'low leaving water',
	'oil-flow': 'oil flow',
	'high-oil-temperature': 'high oil temperature',
	'high-condensing': 'high condensing',
	'high-discharge-temperature': 'high discharge temperature',
	'loss-of-water-flow': 'loss of water flow',
	'low-pressure-difference': 'low pressure difference',
	'motor-temperature': 'motor temperature',
	'starter-fault': 'starter fault',
	'phase-or-supply': 'phase or supply',
	'sensor-or-communication': 'sensor or communication',
	'external-interlock': 'external interlock',
	'refrigerant-detector': 'refrigerant detector',
	'emergency-stop': 'emergency stop',
	other: 'another protection',
	unknown: 'reason not known'
};

export const PROTECTION_WORDS: Readonly<Record<Protection, string>> = {
	evapSaturation: 'Low saturation',
	suctionPressure: 'Low suction pressure',
	leavingWater: 'Low leaving water',
	condSaturation: 'High condensing',
	condPressure: 'High condenser pressure',
	dischargeTemp: 'High discharge temperature',
	oilTemp: 'High oil temperature',
	oilNet: 'Net oil pressure',
	systemDelta: 'Pressure difference',
	margin: 'Oil margin',
	windingTemp: 'Winding temperature'
};

export const FIGURE_WORDS: Readonly<Record<FigureKey, string>> = {
	startCapacity: 'Capacity at start',
	startAmps: 'Current at start',
	peakCapacity: 'Capacity, most',
	timeTo50Seconds: 'Time to 50 %',
	timeTo75Seconds: 'Time to 75 %',
	timeTo90Seconds: 'Time to 90 %',
	timeToPeakSeconds: 'Time to most capacity',
	minEvapSaturation: 'Evap. saturation, least',
	minEvapSaturationAtSeconds: 'Least saturation, when',
	steepestFall: 'Saturation, steepest fall',
	secondsBelowCutout: 'Time below the cut-out',
	degreeSecondsBelowCutout: 'Degree-seconds below the cut-out',
	recoverySeconds: 'Recovery from the dip',
	evapApproach: 'Evap. approach, settled',
	condApproach: 'Cond. approach, settled',
	superheat: 'Superheat, settled',
	settledDischargeSuperheat: 'Discharge superheat, settled',
	settledSubcooling: 'Subcooling, settled',
	settledMargin: 'Margin, settled',
	settledCapacity: 'Capacity, settled',
	settledLift: 'Lift, settled',
	settledOilTemp: 'Oil temperature, settled',
	settledSeconds: 'Settled stretch',
	evapDelta: 'Water difference, settled',
	flow: 'Water flow, settled',
	duty: 'Duty, settled',
	powerPerDuty: 'Power per duty',
	minSuperheat: 'Superheat, least',
	minDischargeSuperheat: 'Discharge superheat, least',
	minMargin: 'Margin, least',
	maxMargin: 'Margin, most',
	marginSlope: 'Margin, slope',
	oilTempSlope: 'Oil temperature, slope',
	maxOilTemp: 'Oil temperature, most',
	maxCondSaturation: 'Cond. saturation, most',
	maxValvePosition: 'Valve, most',
	meanValvePosition: 'Valve, mean',
	secondsAtValveLimit: 'Time at the valve’s limit',
	systemDeltaAt30s: 'Pressure difference at 30 s',
	systemDeltaAt60s: 'Pressure difference at 60 s',
	liftAtStart: 'Lift at 60 s',
	minOilNet: 'Net oil pressure, least',
	oilTempAtStart: 'Oil temperature at start',
	waterOutAtStart: 'Leaving water at start',
	oilLiftAtStart: 'Oil lift at start',
	condWaterInAtStart: 'Cond. water at start',
	outdoorAtStart: 'Outdoor at start',
	pullDownRate: 'Pull-down rate',
	'headroom.evapSaturation': 'Headroom, low saturation',
	'headroom.suctionPressure': 'Headroom, suction pressure',
	'headroom.leavingWater': 'Headroom, leaving water',
	'headroom.condSaturation': 'Headroom, condensing',
	'headroom.condPressure': 'Headroom, condenser pressure',
	'headroom.dischargeTemp': 'Headroom, discharge temperature',
	'headroom.oilTemp': 'Headroom, oil temperature',
	'headroom.oilNet': 'Headroom, net oil pressure',
	'headroom.systemDelta': 'Headroom, pressure difference',
	'headroom.margin': 'Headroom, oil margin',
	'headroom.windingTemp': 'Headroom, winding temperature'
};

export const SUSPECT_WORDS: Readonly<Record<SuspectKey, string>> = {
	'low-oil': 'Low oil',
	'oil-restriction': 'Oil line restriction',
	'slide-not-unloading': 'Slide not unloading',
	'slide-not-loading': 'Slide not loading',
	'valve-underfeeding': 'Valve underfeeding',
	'valve-overfeeding': 'Valve overfeeding',
	'evap-saturation-sensor': 'Evap. saturation sensor',
	'suction-temperature-sensor': 'Suction temperature sensor',
	'low-water-flow': 'Low water flow',
	'flow-proving': 'Flow proving',
	'water-short-circuit': 'Water short circuit',
	'low-refrigerant-charge': 'Low refrigerant charge',
	'liquid-line-restriction': 'Liquid line restriction',
	'suction-restriction': 'Suction restriction',
	'cold-condenser-water': 'Cold condenser water',
	'low-pressure-difference': 'Low pressure difference',
	'fouled-condenser': 'Fouled condenser',
	'non-condensables': 'Non-condensables',
	'fouled-evaporator': 'Fouled evaporator',
	'oil-in-evaporator': 'Oil in the evaporator',
	'refrigerant-migration': 'Refrigerant migration',
	'oil-heater': 'Oil heater',
	'valve-leaking-back': 'Valve leaking back',
	'economiser-or-injection': 'Economiser or injection',
	'starter-or-supply': 'Starter or supply',
	'limits-or-setup': 'Limits or set-up',
	'plant-staging': 'Plant staging'
};

export const LIMIT_WORDS: Readonly<Record<LimitKey, string>> = {
	startUpWindow: 'start-up window',
	firstStartRest: 'first start after a rest of',
	evapSaturationCutout: 'cut-out',
	evapSaturationCutoutDelay: 'cut-out delay',
	startBypass: 'start-up bypass',
	cutoutDegreeSeconds: 'degree-seconds allowed',
	suctionPressureCutout: 'suction cut-out',
	leavingWaterCutout: 'leaving-water cut-out',
	freezeLimit: 'freeze limit',
	condSaturationCutout: 'condensing cut-out',
	condPressureCutout: 'condenser cut-out',
	dischargeTempCutout: 'discharge cut-out',
	oilTempCutout: 'oil temperature cut-out',
	oilNetCutout: 'oil pressure cut-out',
	systemDeltaCutout: 'least pressure difference',
	marginCutout: 'margin cut-out',
	windingTempCutout: 'winding cut-out',
	startCapacityUsualLow: 'usual at start, from',
	startCapacityUsualHigh: 'usual at start, to',
	startCapacityOverStaged: 'over-staged above',
	fullLoading: 'full loading',
	stallBandLow: 'stall band, from',
	stallBandHigh: 'stall band, to',
	lineRestrictionMargin: 'line restriction below',
	marginUsualAtStart: 'usual at start',
	oilTempUsualHigh: 'usual upper end',
	pairedSensorTolerance: 'paired sensors',
	hardSensorTolerance: 'sensor hard to reach',
	oilLevelLow: 'oil level, least',
	oilLevelHigh: 'oil level, most',
	condWaterLeast: 'least entering',
	evapApproachUsualHigh: 'usual evap. approach, to',
	condApproachUsualHigh: 'usual cond. approach, to',
	superheatUsualLow: 'usual superheat, from',
	superheatUsualHigh: 'usual superheat, to',
	currentLimit: 'current limit',
	pumpLead: 'pump lead'
};

export const PROVENANCE_WORDS: Readonly<Record<Provenance, string>> = {
	maker: 'maker',
	practice: 'practice',
	ours: 'ours',
	given: 'given',
	learned: 'learned',
	source: 'source'
};

/** What a provenance means, for a hover or the method page. */
export const PROVENANCE_MEANINGS: Readonly<Record<Provenance, string>> = {
	maker: 'from the unit’s maker; the manual rules',
	practice: 'common practice in the trade, no published source',
	ours: 'this product’s own choice, editable for each unit',
	given: 'entered by a person for this unit',
	learned: 'learned from this unit’s own starts',
	source: 'from a published source, named on the method page'
};

export const STANDING_WORDS = {
	'points-to': 'points to',
	fits: 'fits',
	'speaks-against': 'speaks against',
	'cannot-tell': 'cannot tell'
} as const;
