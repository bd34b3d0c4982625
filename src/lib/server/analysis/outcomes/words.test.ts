import { describe, expect, it } from 'vitest';
import { readAlarm } from './words';

// The wordings are invented in the trade's manner; common practice, no source.
describe('readAlarm', () => {
	it.each([
		['LOW EVAP TEMP', 'low-evaporator-saturation'],
		['LEPT', 'low-evaporator-saturation'],
		['Low evaporator saturation cutout', 'low-evaporator-saturation'],
		['LowRefrigerantTemp', 'low-evaporator-saturation'],
		['EVAP SAT TRIP', 'low-evaporator-saturation'],
		['low suction press cutout', 'low-suction-pressure'],
		['Evaporator pressure low', 'low-suction-pressure'],
		['LP switch', 'low-suction-pressure'],
		['LOW LVG WATER TEMP', 'low-leaving-water'],
		['Freeze protection', 'low-leaving-water'],
		['Oil flow lost', 'oil-flow'],
		['LOW OIL PRESS', 'oil-flow'],
		['OIL DIFF PRESSURE LOW', 'oil-flow'],
		['High oil temperature', 'high-oil-temperature'],
		['HI COND PRESS', 'high-condensing'],
		['High head pressure trip', 'high-condensing'],
		['HP CUTOUT', 'high-condensing'],
		['HI DISCH TEMP', 'high-discharge-temperature'],
		['Loss of evaporator water flow', 'loss-of-water-flow'],
		['Condenser flow switch open', 'loss-of-water-flow'],
		['Low differential pressure', 'low-pressure-difference'],
		['Motor winding temp high', 'motor-temperature'],
		['Starter transition fault', 'starter-fault'],
		['Motor overload', 'starter-fault'],
		['Phase imbalance', 'phase-or-supply'],
		['Undervoltage trip', 'phase-or-supply'],
		['Evap temp sensor open', 'sensor-or-communication'],
		['Comms lost', 'sensor-or-communication'],
		['External interlock open', 'external-interlock'],
		['Refrigerant leak detector', 'refrigerant-detector'],
		['E-STOP', 'emergency-stop'],
		['Surge protection', 'other'],
		['Wet discharge gas shutdown', 'other'],
		['E-217', 'unknown'],
		['1044', 'unknown'],
		['General fault', 'unknown'],
		['LOW EVAP TEMP - MANUAL RESET', 'low-evaporator-saturation']
	])('%s is a trip of kind %s', (text, kind) => {
		expect(readAlarm(text)).toEqual({ is: 'trip', kind });
	});

	it.each([
		['', 'none'],
		['No alarm', 'none'],
		['Normal', 'none'],
		['0', 'none'],
		['OK', 'none'],
		['---', 'none'],
		['Low evap temp warning', 'warning'],
		['Evap temp limiting', 'warning'],
		['LOW EVAP TEMP CLEARED', 'clearing'],
		['Oil flow alarm reset', 'clearing'],
		['Low oil pressure acknowledged', 'acknowledgement'],
		['Power failure', 'power'],
		['Unit stopped by schedule', 'note'],
		['Remote stop', 'note'],
		['Cooling', 'note'],
		['Setpoint satisfied', 'note']
	])('%s is %s', (text, is) => {
		expect(readAlarm(text).is).toBe(is);
	});

	it("puts the unit's own words first, codes too", () => {
		const own = [
			{ words: '217', kind: 'oil-flow' as const },
			{ words: 'stage guard', kind: 'external-interlock' as const }
		];
		expect(readAlarm('E-217', own)).toEqual({ is: 'trip', kind: 'oil-flow' });
		expect(readAlarm('Stage guard', own)).toEqual({ is: 'trip', kind: 'external-interlock' });
		expect(readAlarm('text', own, '217')).toEqual({ is: 'trip', kind: 'oil-flow' });
	});
});
