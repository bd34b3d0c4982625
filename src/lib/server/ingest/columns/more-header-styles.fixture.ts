import { FIRST_STYLES, style, type HeaderStyle } from './header-styles.fixture';

/** Further invented ways of naming columns, and all of them together. */
const MORE_STYLES: readonly HeaderStyle[] = [
	style('SI, words in another place', [
		['Temp. evaporator saturated [°C]', 'evapSaturation'],
		['Temp. condenser saturated [°C]', 'condSaturation'],
		['Temp. oil sump [°C]', 'oilTemp'],
		['Temp. suction line [°C]', 'suctionTemp'],
		['Temp. discharge line [°C]', 'dischargeTemp'],
		['Temp. liquid line [°C]', 'liquidTemp'],
		['Press. suction [bar]', 'evapPressure'],
		['Press. condensing [bar]', 'condPressure'],
		['Press. oil [bar]', 'oilPressure'],
		['Valve opening [%]', 'valvePosition'],
		['Capacity stage [%]', 'capacity'],
		['Operation', null]
	]),
	style('underscored, short, with units behind', [
		['ch_lwt_degf', 'evapWaterOut'],
		['ch_ewt_degf', 'evapWaterIn'],
		['cd_ewt_degf', 'condWaterIn'],
		['cd_lwt_degf', 'condWaterOut'],
		['evap_sat_degf', 'evapSaturation'],
		['cond_sat_degf', 'condSaturation'],
		['oil_temp_degf', 'oilTemp'],
		['comp_amps', 'motorCurrent'],
		['comp_run', 'running'],
		['comp_cap_pct', 'capacity'],
		['exv_pos_pct', 'valvePosition'],
		['fault_text', 'alarm']
	]),
	style('status words', [
		['Compressor On/Off', 'running'],
		['Compressor State', 'running'],
		['Compressor Run Feedback', 'running'],
		['Chiller Running Status', 'running'],
		['Compressor Enable', 'startCommand'],
		['Run Request', 'startCommand'],
		['Start/Stop Command', 'startCommand'],
		['Control Mode', 'unitMode'],
		['Capacity Limit Active', 'activeLimit'],
		['Evaporator Pump Status', 'evapPumpRun'],
		['Condenser Pump Status', 'condPumpRun'],
		['Alarm Message', 'alarm'],
		['Active Fault', 'alarm']
	]),
	style(
		'air-cooled, two circuits',
		[
			['Ckt A Suction Press', 'evapPressure', '1'],
			['Ckt B Suction Press', 'evapPressure', '2'],
			['Ckt A Discharge Press', 'dischargePressure', '1'],
			['Ckt B Discharge Press', 'dischargePressure', '2'],
			['Ckt A Sat Suction Temp', 'evapSaturation', '1'],
			['Ckt B Sat Suction Temp', 'evapSaturation', '2'],
			['Ckt A Sat Cond Temp', 'condSaturation', '1'],
			['Ckt B Sat Cond Temp', 'condSaturation', '2'],
			['Ckt A EXV Position', 'valvePosition', '1'],
			['Ckt B EXV Position', 'valvePosition', '2'],
			['Ckt A Fans', 'fanStage', '1'],
			['Ambient Air Temperature', 'outdoorTemp'],
			['Leaving Fluid Temp', 'evapWaterOut'],
			['Entering Fluid Temp', 'evapWaterIn']
		],
		2
	),
	style(
		'numbers behind',
		[
			['Compressor Run 1', 'running', '1'],
			['Compressor Run 2', 'running', '2'],
			['Oil Temp 1', 'oilTemp', '1'],
			['Oil Temp 2', 'oilTemp', '2'],
			['Slide Valve 1', 'capacity', '1'],
			['Slide Valve 2', 'capacity', '2'],
			['Motor Amps 1', 'motorCurrent', '1'],
			['Motor Amps 2', 'motorCurrent', '2'],
			['Evap Sat 1', 'evapSaturation', '1'],
			['Evap Sat 2', 'evapSaturation', '2'],
			['Cond Sat 1', 'condSaturation', '1'],
			['Cond Sat 2', 'condSaturation', '2']
		],
		2
	),
	style('slashes and dots', [
		['CHW.Supply.Temp', 'evapWaterOut'],
		['CHW.Return.Temp', 'evapWaterIn'],
		['CW.Supply.Temp', 'condWaterIn'],
		['CW.Return.Temp', 'condWaterOut'],
		['Evap.Refr.Press', 'evapPressure'],
		['Cond.Refr.Press', 'condPressure'],
		['Comp.Motor.Current', 'motorCurrent'],
		['Comp.Oil.Press', 'oilPressure'],
		['Comp.Disch.Temp', 'dischargeTemp'],
		['Comp.Suct.Temp', 'suctionTemp']
	]),
	style('cooler and condenser', [
		['Cooler Entering Water', 'evapWaterIn'],
		['Cooler Leaving Water', 'evapWaterOut'],
		['Condenser Entering Water', 'condWaterIn'],
		['Condenser Leaving Water', 'condWaterOut'],
		['Cooler Refrigerant Temp', 'evapSaturation'],
		['Condenser Refrigerant Temp', 'condSaturation'],
		['Cooler Pressure', 'evapPressure'],
		['Guide Vane Position', 'capacity'],
		['Oil Sump Temperature', 'oilTemp'],
		['Oil Pump', 'oilPump']
	]),
	style('drive machines', [
		['Compressor Speed', 'speed'],
		['Drive Frequency', 'speed'],
		['Motor Power kW', 'power'],
		['Line Current', 'motorCurrent'],
		['Winding Temperature A', 'windingTemp'],
		['Inlet Vane Position', 'capacity'],
		['Discharge Gas Temp', 'dischargeTemp']
	]),
	style('inlet and outlet', [
		['Chilled Water Inlet Temperature', 'evapWaterIn'],
		['Chilled Water Outlet Temperature', 'evapWaterOut'],
		['Cooling Water Inlet Temperature', 'condWaterIn'],
		['Cooling Water Outlet Temperature', 'condWaterOut'],
		['Evaporator Inlet Temp', 'evapWaterIn'],
		['Evaporator Outlet Temp', 'evapWaterOut'],
		['Condenser Inlet Temp', 'condWaterIn'],
		['Condenser Outlet Temp', 'condWaterOut']
	]),
	style('saturation in other words', [
		['Saturated Evaporator Temperature', 'evapSaturation'],
		['Saturated Condenser Temperature', 'condSaturation'],
		['Evaporator Sat Temp', 'evapSaturation'],
		['Condensing Saturation', 'condSaturation'],
		['Saturation Temp Suction', 'evapSaturation'],
		['Saturation Temp Discharge', 'condSaturation'],
		['Evaporating Temp', 'evapSaturation'],
		['Condensing Temp', 'condSaturation'],
		['Low Pressure', 'evapPressure'],
		['High Pressure', 'condPressure']
	])
];

export const HEADER_STYLES: readonly HeaderStyle[] = [...FIRST_STYLES, ...MORE_STYLES];
