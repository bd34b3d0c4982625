import type { Quantity } from './quantities';
import type { LimitKey, Provenance } from './unit';

/** The quantity of each limit, so that a page can show and take it in a person's own units of measure. */
export const LIMIT_QUANTITIES: Readonly<Record<LimitKey, Quantity | 'degreeSeconds' | 'length'>> = {
	startUpWindow: 'duration',
	firstStartRest: 'duration',
	evapSaturationCutout: 'temperature',
	evapSaturationCutoutDelay: 'duration',
	startBypass: 'duration',
	cutoutDegreeSeconds: 'degreeSeconds',
	suctionPressureCutout: 'pressure',
	leavingWaterCutout: 'temperature',
	freezeLimit: 'temperature',
	condSaturationCutout: 'temperature',
	condPressureCutout: 'pressure',
	dischargeTempCutout: 'temperature',
	oilTempCutout: 'temperature',
	oilNetCutout: 'pressureDifference',
	systemDeltaCutout: 'pressureDifference',
	marginCutout: 'temperatureDifference',
	windingTempCutout: 'temperature',
	startCapacityUsualLow: 'percent',
	startCapacityUsualHigh: 'percent',
	startCapacityOverStaged: 'percent',
	fullLoading: 'percent',
	stallBandLow: 'percent',
	stallBandHigh: 'percent',
	lineRestrictionMargin: 'temperatureDifference',
	marginUsualAtStart: 'temperatureDifference',
	oilTempUsualHigh: 'temperature',
	pairedSensorTolerance: 'temperatureDifference',
	hardSensorTolerance: 'temperatureDifference',
	oilLevelLow: 'length',
	oilLevelHigh: 'length',
	condWaterLeast: 'temperature',
	evapApproachUsualHigh: 'temperatureDifference',
	condApproachUsualHigh: 'temperatureDifference',
	superheatUsualLow: 'temperatureDifference',
	superheatUsualHigh: 'temperatureDifference',
	currentLimit: 'percent',
	pumpLead: 'duration'
};
export const LIMIT_ORDER = Object.keys(LIMIT_QUANTITIES) as readonly LimitKey[];

const K_PER_DEGF = 5 / 9;

/**
 * Starting values for one kind of machine: twin screw, slide moved by oil both ways, flooded, water-cooled, fixed
 * speed. Common practice, no source, but the over-staged mark, which is ours. A person confirms each; the
 * manufacturer's manual rules. Stored units.
 */
export const TWIN_SCREW_PRESET: readonly { key: LimitKey; value: number; provenance: Provenance }[] = [
	{ key: 'startCapacityUsualLow', value: 40, provenance: 'practice' },
	{ key: 'startCapacityUsualHigh', value: 50, provenance: 'practice' },
	{ key: 'startCapacityOverStaged', value: 55, provenance: 'ours' },
	{ key: 'fullLoading', value: 100, provenance: 'practice' },
	{ key: 'stallBandLow', value: 85, provenance: 'practice' },
	{ key: 'stallBandHigh', value: 90, provenance: 'practice' },
	{ key: 'lineRestrictionMargin', value: -4 * K_PER_DEGF, provenance: 'practice' },
	{ key: 'marginUsualAtStart', value: 8 * K_PER_DEGF, provenance: 'practice' },
	{ key: 'oilTempUsualHigh', value: 60, provenance: 'practice' },
	{ key: 'pairedSensorTolerance', value: 2 * K_PER_DEGF, provenance: 'practice' },
	{ key: 'hardSensorTolerance', value: 3 * K_PER_DEGF, provenance: 'practice' },
	{ key: 'oilLevelLow', value: 127, provenance: 'practice' },
	{ key: 'oilLevelHigh', value: 254, provenance: 'practice' }
];
