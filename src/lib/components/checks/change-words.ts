import type { ChangeKind } from '$lib/model/wire/field';

/** What each kind of change is called. */
export const CHANGE_WORDS: Readonly<Record<ChangeKind, string>> = {
	oil: 'Oil added or taken out',
	refrigerant: 'Refrigerant added or recovered',
	sensor: 'Sensor replaced or moved',
	solenoid: 'Solenoid replaced',
	valve: 'Valve replaced or adjusted',
	setting: 'Setting changed',
	cleaning: 'Cleaned',
	'water-side': 'Water side: strainer, pump, flow',
	electrical: 'Electrical',
	compressor: 'Compressor replaced',
	controller: 'Controller replaced',
	other: 'Something else'
};
