import type { SignalKey } from '$lib/model/signals';

/**
 * Ways of naming columns, invented here from single trade words and their common contractions: what each name should
 * be taken for (null: nothing the product knows). Names only; ranges and behaviour are not used on them.
 */
export type HeaderStyle = {
	style: string;
	circuits: number;
	columns: [name: string, signal: SignalKey | null, circuit?: string][];
};

export const style = (name: string, columns: HeaderStyle['columns'], circuits = 1): HeaderStyle => ({
	style: name,
	circuits,
	columns
});

export const FIRST_STYLES: readonly HeaderStyle[] = [
	style('plain words, units in brackets', [
		['Compressor Running', 'running'],
		['Compressor Start Command', 'startCommand'],
		['Demand (%)', 'demand'],
		['Capacity (%)', 'capacity'],
		['Motor Current (A)', 'motorCurrent'],
		['Evaporator Saturation Temperature (°F)', 'evapSaturation'],
		['Evaporator Pressure (psig)', 'evapPressure'],
		['Suction Temperature (°F)', 'suctionTemp'],
		['Entering Chilled Water Temperature (°F)', 'evapWaterIn'],
		['Leaving Chilled Water Temperature (°F)', 'evapWaterOut'],
		['Chilled Water Setpoint (°F)', 'waterSetpoint'],
		['Condenser Saturation Temperature (°F)', 'condSaturation'],
		['Condenser Pressure (psig)', 'condPressure'],
		['Discharge Temperature (°F)', 'dischargeTemp'],
		['Entering Condenser Water Temperature (°F)', 'condWaterIn'],
		['Leaving Condenser Water Temperature (°F)', 'condWaterOut'],
		['Oil Temperature (°F)', 'oilTemp'],
		['Oil Pressure (psig)', 'oilPressure'],
		['Expansion Valve Position (%)', 'valvePosition'],
		['Alarm', 'alarm']
	]),
	style('short trade letters', [
		['LWT', 'evapWaterOut'],
		['EWT', 'evapWaterIn'],
		['ECWT', 'condWaterIn'],
		['LCWT degF', 'condWaterOut'],
		['SST', 'evapSaturation'],
		['SCT', 'condSaturation'],
		['% RLA', 'motorCurrent'],
		['Slide %', 'capacity'],
		['Oil Temp', 'oilTemp'],
		['EXV %', 'valvePosition'],
		['OAT', 'outdoorTemp'],
		['Run', 'running']
	]),
	style('building-system abbreviations, underscores', [
		['CHWS_TEMP', 'evapWaterOut'],
		['CHWR_TEMP', 'evapWaterIn'],
		['CWS_TEMP', 'condWaterIn'],
		['CWR_TEMP', 'condWaterOut'],
		['CHW_FLOW_GPM', 'evapFlow'],
		['CW_FLOW_GPM', 'condFlow'],
		['CHW_STPT', 'waterSetpoint'],
		['COMP_STS', 'running'],
		['COMP_CMD', 'startCommand'],
		['EVAP_SAT_TEMP', 'evapSaturation'],
		['COND_SAT_TEMP', 'condSaturation'],
		['EVAP_PRESS', 'evapPressure'],
		['COND_PRESS', 'condPressure'],
		['OIL_TEMP', 'oilTemp'],
		['OIL_PRESS', 'oilPressure'],
		['MTR_AMPS', 'motorCurrent'],
		['CHWP_STS', 'evapPumpRun'],
		['CWP_STS', 'condPumpRun'],
		['OA_TEMP', 'outdoorTemp'],
		['KW', 'power']
	]),
	style('camel case', [
		['EvapSatTemp', 'evapSaturation'],
		['CondSatTemp', 'condSaturation'],
		['EvapLeavingWaterTemp', 'evapWaterOut'],
		['EvapEnteringWaterTemp', 'evapWaterIn'],
		['CondEnteringWaterTemp', 'condWaterIn'],
		['CondLeavingWaterTemp', 'condWaterOut'],
		['OilSumpTemp', 'oilTemp'],
		['OilFeedPressure', 'oilPressure'],
		['SlideValvePosition', 'capacity'],
		['LoadDemand', 'demand'],
		['MotorAmps', 'motorCurrent'],
		['CompressorRunStatus', 'running'],
		['SuctionGasTemp', 'suctionTemp'],
		['DischargeGasTemp', 'dischargeTemp'],
		['ExpansionValvePos', 'valvePosition'],
		['FaultCode', 'alarm']
	]),
	style(
		'circuits by number, contracted',
		[
			['Ckt 1 Evap Sat Rfgt Temp', 'evapSaturation', '1'],
			['Ckt 2 Evap Sat Rfgt Temp', 'evapSaturation', '2'],
			['Ckt 1 Cond Sat Rfgt Temp', 'condSaturation', '1'],
			['Ckt 2 Cond Sat Rfgt Temp', 'condSaturation', '2'],
			['Ckt 1 Oil Temp', 'oilTemp', '1'],
			['Ckt 2 Oil Temp', 'oilTemp', '2'],
			['Comp 1 Amps', 'motorCurrent', '1'],
			['Comp 2 Amps', 'motorCurrent', '2'],
			['Comp 1 Run', 'running', '1'],
			['Comp 2 Run', 'running', '2'],
			['Evap Lvg Wtr Temp', 'evapWaterOut'],
			['Evap Ent Wtr Temp', 'evapWaterIn'],
			['Cond Ent Wtr Temp', 'condWaterIn'],
			['Cond Lvg Wtr Temp', 'condWaterOut']
		],
		2
	),
	style(
		'circuits by letter behind',
		[
			['Suction Pressure A', 'evapPressure', '1'],
			['Suction Pressure B', 'evapPressure', '2'],
			['Discharge Pressure A', 'dischargePressure', '1'],
			['Discharge Pressure B', 'dischargePressure', '2'],
			['Compressor A Status', 'running', '1'],
			['Compressor B Status', 'running', '2'],
			['Load % A', 'capacity', '1'],
			['Load % B', 'capacity', '2'],
			['Chilled Water Out', 'evapWaterOut'],
			['Chilled Water In', 'evapWaterIn'],
			['Ambient Temp', 'outdoorTemp']
		],
		2
	),
	style(
		'c1, c2 in front',
		[
			['C1.SuctSatTemp', 'evapSaturation', '1'],
			['C2.SuctSatTemp', 'evapSaturation', '2'],
			['C1.DischSatTemp', 'condSaturation', '1'],
			['C2.DischSatTemp', 'condSaturation', '2'],
			['C1.DischTemp', 'dischargeTemp', '1'],
			['C2.DischTemp', 'dischargeTemp', '2'],
			['C1.Capacity', 'capacity', '1'],
			['C2.Capacity', 'capacity', '2'],
			['C1.EXV', 'valvePosition', '1'],
			['C2.EXV', 'valvePosition', '2'],
			['C1.Run', 'running', '1'],
			['C2.Run', 'running', '2']
		],
		2
	),
	style('Brick classes', [
		['Leaving_Chilled_Water_Temperature_Sensor', 'evapWaterOut'],
		['Entering_Chilled_Water_Temperature_Sensor', 'evapWaterIn'],
		['Entering_Condenser_Water_Temperature_Sensor', 'condWaterIn'],
		['Leaving_Condenser_Water_Temperature_Sensor', 'condWaterOut'],
		['Chilled_Water_Flow_Sensor', 'evapFlow'],
		['Motor_Current_Sensor', 'motorCurrent'],
		['Electronic_Expansion_Valve', 'valvePosition'],
		['Run_Status', 'running'],
		['Outside_Air_Temperature_Sensor', 'outdoorTemp'],
		['Leaving_Chilled_Water_Temperature_Setpoint', 'waterSetpoint']
	]),
	style('Haystack tags', [
		['chilled water leaving temp sensor', 'evapWaterOut'],
		['chilled water entering temp sensor', 'evapWaterIn'],
		['condenser water entering temp sensor', 'condWaterIn'],
		['condenser water leaving temp sensor', 'condWaterOut'],
		['chilled water leaving temp sp', 'waterSetpoint'],
		['chiller run cmd', 'startCommand'],
		['compressor run sensor', 'running'],
		['discharge refrig temp sensor', 'dischargeTemp'],
		['suction refrig pressure sensor', 'evapPressure'],
		['elec power sensor', 'power'],
		['chilled water flow sensor', 'evapFlow']
	]),
	style('metric, comma before unit', [
		['Verdampfungstemp. gesättigt, °C', null],
		['Evaporating temperature, °C', 'evapSaturation'],
		['Condensing temperature, °C', 'condSaturation'],
		['Suction gas temperature, °C', 'suctionTemp'],
		['Discharge gas temperature, °C', 'dischargeTemp'],
		['Chilled water outlet, °C', 'evapWaterOut'],
		['Chilled water inlet, °C', 'evapWaterIn'],
		['Cooling water inlet, °C', 'condWaterIn'],
		['Cooling water outlet, °C', 'condWaterOut'],
		['Evaporating pressure, bar(g)', 'evapPressure'],
		['Condensing pressure, bar(g)', 'condPressure'],
		['Oil pressure, bar(g)', 'oilPressure'],
		['Water flow evaporator, l/s', 'evapFlow'],
		['Power input, kW', 'power']
	]),
	style('everything in lower case, run together', [
		['evapsattemp', 'evapSaturation'],
		['condsattemp', 'condSaturation'],
		['oiltemp', 'oilTemp'],
		['suctiontemp', 'suctionTemp'],
		['dischargetemp', 'dischargeTemp'],
		['motoramps', 'motorCurrent'],
		['slideposition', 'capacity'],
		['oilpressure', 'oilPressure'],
		['runstatus', 'running']
	]),
	style('paths with a tag', [
		['Plant/CH-1/Evap Leaving Water Temp', 'evapWaterOut'],
		['Plant/CH-1/Evap Entering Water Temp', 'evapWaterIn'],
		['Plant/CH-1/Cond Entering Water Temp', 'condWaterIn'],
		['Plant/CH-1/Sat Evap Temp', 'evapSaturation'],
		['Plant/CH-1/Sat Cond Temp', 'condSaturation'],
		['Plant/CH-1/Motor Amps %RLA', 'motorCurrent'],
		['Plant/CH-1/Run Status', 'running'],
		['Plant/CH-1/Oil Tank Temp', 'oilTemp']
	]),
	style('status and water proving', [
		['Chiller Enable', 'startCommand'],
		['Chiller On/Off', 'running'],
		['Operating Mode', 'unitMode'],
		['Active Limit', 'activeLimit'],
		['CHW Flow Switch', 'evapFlowProof'],
		['CW Flow Switch', 'condFlowProof'],
		['CHW Pump Status', 'evapPumpRun'],
		['CW Pump Status', 'condPumpRun'],
		['Oil Heater', 'oilHeater'],
		['Oil Pump', 'oilPump'],
		['Oil Level', 'oilLevelSwitch'],
		['Liquid Line Solenoid', 'liquidLineSolenoid'],
		['Starts', 'startsCounter'],
		['Run Hours', 'runHours'],
		['Trip', 'alarm']
	]),
	style('electrical', [
		['Amps L1', 'phaseCurrents'],
		['Amps L2', 'phaseCurrents'],
		['Amps L3', 'phaseCurrents'],
		['Volts L1-L2', 'phaseVoltages'],
		['Average Amps', 'motorCurrent'],
		['Compressor kW', 'power'],
		['Motor Winding Temp 1', 'windingTemp'],
		['Compressor Speed (Hz)', 'speed'],
		['Motor Temp', 'windingTemp']
	]),
	style('things the product does not know', [
		['Superheat (°F)', null],
		['Subcooling', null],
		['Condenser Approach', null],
		['Zone Temp', null],
		['Delta T', null],
		['Power Factor', null],
		['Tower Fan Speed', null],
		['Efficiency kW/ton', null],
		['Outdoor Humidity', null],
		['Max Evap Temp Today', null],
		['Operator', null],
		['Comment', null]
	]),
	style('valves and levels', [
		['Evap Refrigerant Level %', 'evapLevel'],
		['Condenser Level %', 'condLevel'],
		['EEV Position %', 'valvePosition'],
		['Economizer Valve', 'economiserValve'],
		['Liquid Injection Valve', 'injection'],
		['Liquid Line Temp F', 'liquidTemp'],
		['Inlet Guide Vanes %', 'capacity'],
		['Condenser Fan Stage', 'fanStage'],
		['Oil Filter Differential Pressure', 'oilFilterDrop']
	]),
	style('words in another order', [
		['Temp Water Chilled Leaving', 'evapWaterOut'],
		['Temp Water Chilled Entering', 'evapWaterIn'],
		['Pressure Evaporator', 'evapPressure'],
		['Pressure Condenser', 'condPressure'],
		['Temperature Oil', 'oilTemp'],
		['Current Motor', 'motorCurrent'],
		['Position Slide', 'capacity'],
		['Status Compressor', 'running'],
		['Temperature, Saturated Suction', 'evapSaturation'],
		['Temperature, Saturated Discharge', 'condSaturation']
	]),
	style('demand and load', [
		['Load Demand %', 'demand'],
		['Actual Load %', 'capacity'],
		['Capacity Command %', 'demand'],
		['Slide Position Feedback %', 'capacity'],
		['Requested Capacity', 'demand'],
		['Compressor Load', 'capacity'],
		['Percent Capacity', 'capacity'],
		['%FLA', 'motorCurrent']
	]),
	style('supply and return', [
		['Chilled Water Supply Temp', 'evapWaterOut'],
		['Chilled Water Return Temp', 'evapWaterIn'],
		['Condenser Water Supply Temp', 'condWaterIn'],
		['Condenser Water Return Temp', 'condWaterOut'],
		['CHWST', 'evapWaterOut'],
		['CHWRT', 'evapWaterIn'],
		['CDWST', 'condWaterIn'],
		['CDWRT', 'condWaterOut']
	]),
	style('head and suction', [
		['Head Pressure', 'condPressure'],
		['Suct Press PSIG', 'evapPressure'],
		['Disch Press PSIG', 'dischargePressure'],
		['Suct Temp F', 'suctionTemp'],
		['Disch Temp F', 'dischargeTemp'],
		['Low Side Pressure', 'evapPressure'],
		['High Side Pressure', 'condPressure'],
		['Oil Sump Temp F', 'oilTemp'],
		['Comp Amps', 'motorCurrent']
	]),
	style('capitals without separators', [
		['LVG EVAP WTR TEMP', 'evapWaterOut'],
		['ENT EVAP WTR TEMP', 'evapWaterIn'],
		['ENT COND WTR TEMP', 'condWaterIn'],
		['LVG COND WTR TEMP', 'condWaterOut'],
		['SAT EVAP TEMP', 'evapSaturation'],
		['SAT COND TEMP', 'condSaturation'],
		['OIL SUPPLY TEMP', 'oilTemp'],
		['OIL SUPPLY PRESS', 'oilPressure'],
		['CAPACITY', 'capacity'],
		['COMPRESSOR STATUS', 'running'],
		['ALARM STATUS', 'alarm'],
		['ACTIVE SETPOINT', 'waterSetpoint']
	]),
	style('double spaces and numbers', [
		['Leaving  Water  Temp', 'evapWaterOut'],
		['Entering  Water  Temp', 'evapWaterIn'],
		['Leaving Water Setpoint', 'waterSetpoint'],
		['Compressor 1 Running', 'running'],
		['Compressor 1 Current', 'motorCurrent'],
		['Circuit 1 Suction Pressure', 'evapPressure'],
		['Circuit 1 Discharge Pressure', 'dischargePressure'],
		['Circuit 1 Expansion Valve', 'valvePosition'],
		['Outdoor Air Temp', 'outdoorTemp']
	])
];
