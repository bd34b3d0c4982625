import type { SignalKey } from '$lib/model/signals';
import type { Idea } from './lexicon';

/** A way to name a signal: one idea of each set must be there; `may` ideas add nothing and take nothing away. */
export type NameRule = { signal: SignalKey; all: readonly (readonly Idea[])[]; may: readonly Idea[]; sure: number };

const RULES: NameRule[] = [];

/** `all`: ideas parted by blanks, alternatives by `|`. */
function rule(signal: SignalKey, sure: number, all: string, may = ''): void {
	RULES.push({
		signal,
		sure,
		all: all.split(' ').map((set) => set.split('|') as Idea[]),
		may: (may === '' ? [] : may.split(' ')) as Idea[]
	});
}

rule('evapWaterOut', 0.97, 'evap water leaving|supply', 'temperature unit');
rule('evapWaterOut', 0.94, 'evap leaving temperature', 'water unit');
rule('evapWaterOut', 0.82, 'evap leaving', 'unit');
rule('evapWaterOut', 0.9, 'water leaving', 'temperature unit');
rule('evapWaterOut', 0.84, 'water supply temperature', 'unit');
rule('evapWaterOut', 0.82, 'unit leaving temperature', 'water');
rule('evapWaterOut', 0.82, 'unit supply temperature', 'water');
rule('evapWaterOut', 0.82, 'leaving|supply temperature', 'unit');
rule('evapWaterIn', 0.82, 'entering|return temperature', 'unit');
rule('evapWaterIn', 0.97, 'evap water entering|return', 'temperature unit');
rule('evapWaterIn', 0.94, 'evap entering temperature', 'water unit');
rule('evapWaterIn', 0.82, 'evap entering', 'unit');
rule('evapWaterIn', 0.9, 'water entering', 'temperature unit');
rule('evapWaterIn', 0.84, 'water return temperature', 'unit');
rule('evapWaterIn', 0.82, 'unit entering temperature', 'water');
rule('evapWaterIn', 0.82, 'unit return temperature', 'water');
rule('condWaterIn', 0.97, 'cond water entering|supply', 'temperature unit');
rule('condWaterIn', 0.93, 'cond entering temperature', 'water unit');
rule('condWaterIn', 0.84, 'cond entering', 'unit');
rule('condWaterOut', 0.97, 'cond water leaving|return', 'temperature unit');
rule('condWaterOut', 0.93, 'cond leaving temperature', 'water unit');
rule('condWaterOut', 0.84, 'cond leaving', 'unit');
rule('condAirIn', 0.92, 'cond air', 'entering temperature unit');
rule('condAirIn', 0.84, 'air entering', 'temperature unit');
rule('outdoorTemp', 0.95, 'outdoor', 'temperature air unit');
rule('waterSetpoint', 0.96, 'setpoint water', 'evap leaving supply temperature active unit');
rule('waterSetpoint', 0.93, 'setpoint evap', 'leaving temperature active unit');
rule('waterSetpoint', 0.9, 'setpoint active', 'temperature unit leaving supply');
rule('waterSetpoint', 0.86, 'setpoint leaving|supply', 'temperature unit');
rule('waterSetpoint', 0.82, 'setpoint unit', 'temperature');
rule('waterSetpoint', 0.8, 'setpoint temperature', '');
rule('waterSetpoint', 0.72, 'setpoint', '');

rule('evapSaturation', 0.97, 'evap saturation', 'temperature refrigerant suction unit compressor boiling');
rule('evapSaturation', 0.96, 'suction saturation', 'temperature refrigerant unit compressor');
rule('evapSaturation', 0.94, 'evap boiling temperature', 'refrigerant unit suction');
rule('evapSaturation', 0.9, 'evap refrigerant temperature', 'unit');
rule('evapSaturation', 0.6, 'evap temperature', 'unit');
rule('condSaturation', 0.97, 'cond saturation', 'temperature refrigerant discharge unit compressor boiling');
rule('condSaturation', 0.96, 'discharge saturation', 'temperature refrigerant unit compressor');
rule('condSaturation', 0.94, 'cond boiling temperature', 'refrigerant unit');
rule('condSaturation', 0.9, 'cond refrigerant temperature', 'unit');
rule('condSaturation', 0.6, 'cond temperature', 'unit');
rule('evapPressure', 0.96, 'evap pressure', 'refrigerant boiling unit suction saturation');
rule('evapPressure', 0.93, 'suction pressure', 'refrigerant unit compressor saturation');
rule('condPressure', 0.96, 'cond pressure', 'refrigerant boiling unit saturation');
rule('dischargePressure', 0.95, 'discharge pressure', 'refrigerant unit compressor');
rule('suctionTemp', 0.95, 'suction temperature', 'refrigerant unit compressor line entering');
rule('suctionTemp', 0.8, 'suction refrigerant', 'unit compressor');
rule('dischargeTemp', 0.95, 'discharge temperature', 'refrigerant unit compressor line leaving');
rule('dischargeTemp', 0.8, 'discharge refrigerant', 'unit compressor');
rule('liquidTemp', 0.95, 'liquid temperature', 'line refrigerant unit cond leaving');
rule('evapLevel', 0.94, 'evap level', 'refrigerant liquid unit');
rule('evapLevel', 0.82, 'refrigerant|liquid level', 'unit');
rule('condLevel', 0.94, 'cond level', 'refrigerant liquid unit');
rule('valvePosition', 0.95, 'expansion', 'position percent valve unit evap command refrigerant');
rule('valvePosition', 0.76, 'evap valve position', 'percent unit');
rule('valvePosition', 0.8, 'liquid|refrigerant valve position', 'percent unit line evap');
rule('valvePosition', 0.86, 'valve position', 'percent unit');
rule('economiserValve', 0.94, 'economiser valve|expansion|solenoid', 'position percent unit liquid');
rule('economiserValve', 0.8, 'economiser', 'position percent status command run');
rule('injection', 0.93, 'injection', 'liquid valve solenoid position percent unit oil');
rule('liquidLineSolenoid', 0.95, 'liquid solenoid', 'line valve status command unit');

rule('oilTemp', 0.96, 'oil temperature', 'oilPlace supply unit compressor entering leaving');
rule('oilTemp', 0.82, 'oil oilPlace', 'unit compressor');
rule('oilPressure', 0.95, 'oil pressure', 'oilPlace supply unit compressor entering');
rule('oilFilterDrop', 0.95, 'oil filter difference', 'pressure unit compressor');
rule('oilLevelSwitch', 0.92, 'oil level', 'oilPlace proof status unit compressor');
rule('oilHeater', 0.95, 'oil heater', 'oilPlace status command run unit compressor');
rule('oilHeater', 0.8, 'compressor heater', 'status command run');
rule('oilPump', 0.95, 'oil pump', 'status command run unit compressor');

rule('demand', 0.93, 'demand', 'load capacity percent compressor unit command');
rule('demand', 0.88, 'load|capacity|slide command', 'percent compressor unit position');
rule('demand', 0.86, 'load|capacity|slide setpoint', 'percent compressor unit position');
rule('capacity', 0.95, 'slide', 'valve position load percent compressor unit status capacity');
rule('capacity', 0.94, 'capacity', 'percent compressor unit active average load status stage');
rule('capacity', 0.9, 'load', 'percent compressor unit average');
rule('capacity', 0.92, 'vanes', 'position percent compressor unit entering');
rule('capacity', 0.82, 'compressor|unit stage', 'capacity percent active status');
rule('speed', 0.93, 'speed', 'compressor motor unit');
rule('motorCurrent', 0.94, 'current', 'compressor motor average unit load line percent rated');
rule('motorCurrent', 0.95, 'rated', 'current compressor motor average unit load percent');
rule('phaseCurrents', 0.93, 'current phase', 'compressor motor unit line');
rule('phaseVoltages', 0.93, 'voltage', 'compressor motor unit line phase average');
rule('power', 0.94, 'power', 'compressor motor unit average entering');
rule('windingTemp', 0.95, 'winding', 'temperature motor phase compressor unit');
rule('windingTemp', 0.92, 'motor temperature', 'compressor unit phase');

rule('running', 0.96, 'run compressor', 'status unit motor proof');
rule('running', 0.95, 'run', 'status compressor unit motor proof');
rule('running', 0.88, 'compressor|motor status|proof', 'unit');
rule('running', 0.78, 'unit status', '');
rule('running', 0.72, 'compressor', '');
rule('running', 0.7, 'status', '');
rule('startCommand', 0.95, 'start command', 'compressor unit status');
rule('startCommand', 0.94, 'run command', 'compressor unit status');
rule('startCommand', 0.92, 'compressor command', 'unit status');
rule('startCommand', 0.9, 'unit command', 'status');
rule('startCommand', 0.84, 'start stop', 'compressor unit command status');
// With nothing else said and on/off by its values, it is the machine's own command: pumps and valves are named.
rule('startCommand', 0.84, 'command', '');
rule('unitMode', 0.93, 'mode', 'unit compressor status active');
rule('unitMode', 0.66, 'unit status', 'active');
rule('activeLimit', 0.92, 'limit active|status|mode', 'unit compressor');
rule('activeLimit', 0.8, 'limit', 'unit compressor capacity load');

rule('evapFlow', 0.95, 'evap flow', 'water unit leaving supply');
rule('evapFlow', 0.84, 'water flow', 'unit');
rule('evapFlow', 0.62, 'flow', 'unit');
rule('condFlow', 0.95, 'cond flow', 'water unit');
rule('evapFlowProof', 0.96, 'evap flow proof|status', 'water unit');
rule('evapFlowProof', 0.84, 'flow proof', 'water unit status');
rule('condFlowProof', 0.96, 'cond flow proof|status', 'water unit');
rule('evapPumpRun', 0.95, 'evap pump', 'water run status command proof unit');
rule('condPumpRun', 0.95, 'cond pump', 'water run status command proof unit');
rule('fanStage', 0.92, 'fan', 'stage cond speed status unit percent run starts');

rule('startsCounter', 0.95, 'starts', 'compressor unit average');
rule('runHours', 0.95, 'hours', 'run compressor unit average');
rule('alarm', 0.93, 'alarm', 'status active unit compressor');

export const NAME_RULES: readonly NameRule[] = RULES;

/** Ideas that make a column something else than the signal its other words name. */
export const SPOILERS: ReadonlySet<Idea> = new Set([
	'foreign',
	'derived',
	'difference',
	'rate',
	'extreme',
	'setpoint',
	'limit',
	'alarm'
]);
