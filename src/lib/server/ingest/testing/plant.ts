/**
 * An invented chiller for the reader's tests: smooth made-up curves, no physics and no machine. Values are SI.
 */
export type PlantRow = {
	/** ms UTC */
	t: number;
	running: number;
	demand: number;
	capacity: number;
	amps: number;
	evapSat: number;
	evapKpa: number;
	waterIn: number;
	waterOut: number;
	condSat: number;
	condKpa: number;
	condIn: number;
	condOut: number;
	suction: number;
	discharge: number;
	oil: number;
	oilKpa: number;
	valve: number;
	alarm: string;
};

/** R-134a dew pressure, kPa absolute, near enough for tests: ln p linear in 1/T through 0 and 50 °C of the EOS table. */
function dewPressure(t: number): number {
	const slope = Math.log(1317.9055 / 292.8032) / (1 / 273.15 - 1 / 323.15);
	return 292.8032 * Math.exp(slope * (1 / 273.15 - 1 / (t + 273.15)));
}

function wobble(i: number, k: number): number {
	return Math.sin(i * 0.37 + k * 1.7) * 0.4 + Math.sin(i * 0.053 + k) * 0.6;
}

/** Rows from `from` (ms UTC) at a spacing: on from the 7th to the 15th hour of each UTC day, tripping on the second day at 7:10. */
export function plantRows(from: number, days: number, stepSeconds: number): PlantRow[] {
	const rows: PlantRow[] = [];
	const n = Math.round((days * 86_400) / stepSeconds);
	for (let i = 0; i < n; i++) {
		const t = from + i * stepSeconds * 1000;
		const hour = (t / 3_600_000) % 24;
		const day = Math.floor((t - from) / 86_400_000);
		const tripped = day === 1 && hour >= 7 + 10 / 60 && hour < 9;
		const on = hour >= 7 && hour < 15 && !tripped;
		const age = on ? (hour - (hour >= 9 && day === 1 ? 9 : 7)) * 60 : 0;
		const load = on ? Math.min(1, 0.4 + age / 30) * (0.9 + 0.05 * wobble(i, 1)) : 0;
		const waterOut = on ? 7 + 5 * Math.exp(-age / 15) + 0.1 * wobble(i, 2) : 12 + 0.1 * wobble(i, 2);
		const condIn = 24 + 3 * Math.sin(hour / 4) + 0.1 * wobble(i, 3);
		const evapSat = on ? waterOut - 1.5 - load - (age < 3 ? 3 : 0) : waterOut + 0.3;
		const condOut = condIn + 4.5 * load;
		const condSat = on ? condOut + 1 + load : condIn + 0.4;
		rows.push({
			t,
			running: on ? 1 : 0,
			demand: on ? Math.min(100, 60 + age) : 0,
			capacity: load * 100,
			amps: on ? 60 + 240 * load : 0,
			evapSat,
			evapKpa: dewPressure(evapSat),
			waterIn: waterOut + 5 * load + (on ? 0.2 : 0.05),
			waterOut,
			condSat,
			condKpa: dewPressure(condSat),
			condIn,
			condOut,
			suction: evapSat + (on ? 4 : 8),
			discharge: on ? condSat + 18 : condSat + 4 + wobble(i, 4),
			oil: on ? condSat + 9 + wobble(i, 5) * 0.3 : 38 + wobble(i, 5),
			oilKpa: on ? dewPressure(condSat) - 30 : dewPressure(evapSat) + 5,
			valve: on ? 30 + 30 * load : 0,
			alarm: tripped ? 'Low evaporator saturation' : ''
		});
	}
	return rows;
}

const f = (c: number) => c * 1.8 + 32;
const psig = (kpa: number) => (kpa - 101.325) / 6.894757293168361;

export type Field = [header: string, value: (row: PlantRow) => string];
const fix = (x: number, places: number) => x.toFixed(places);

/** Columns in °F and psig, plainly named. */
export const IP_FIELDS: Field[] = [
	['Compressor Running', (r) => String(r.running)],
	['Demand (%)', (r) => fix(r.demand, 1)],
	['Slide Position (%)', (r) => fix(r.capacity, 1)],
	['Motor Current (A)', (r) => fix(r.amps, 1)],
	['Evaporator Saturation Temp (°F)', (r) => fix(f(r.evapSat), 1)],
	['Evaporator Pressure (psig)', (r) => fix(psig(r.evapKpa), 1)],
	['Entering Chilled Water Temp (°F)', (r) => fix(f(r.waterIn), 1)],
	['Leaving Chilled Water Temp (°F)', (r) => fix(f(r.waterOut), 1)],
	['Condenser Saturation Temp (°F)', (r) => fix(f(r.condSat), 1)],
	['Condenser Pressure (psig)', (r) => fix(psig(r.condKpa), 1)],
	['Entering Condenser Water Temp (°F)', (r) => fix(f(r.condIn), 1)],
	['Leaving Condenser Water Temp (°F)', (r) => fix(f(r.condOut), 1)],
	['Suction Temp (°F)', (r) => fix(f(r.suction), 1)],
	['Discharge Temp (°F)', (r) => fix(f(r.discharge), 1)],
	['Oil Temp (°F)', (r) => fix(f(r.oil), 1)],
	['Oil Pressure (psig)', (r) => fix(psig(r.oilKpa), 1)],
	['Expansion Valve (%)', (r) => fix(r.valve, 0)],
	['Alarm', (r) => r.alarm]
];

/** Columns in °C and kPa, in trade letters, without a word about gauge or absolute. */
export const SI_FIELDS: Field[] = [
	['Comp status', (r) => (r.running ? 'Running' : 'Off')],
	['Load %', (r) => fix(r.capacity, 1)],
	['Amps', (r) => fix(r.amps, 0)],
	['SST', (r) => fix(r.evapSat, 2)],
	['Evap press kPa', (r) => fix(r.evapKpa - 101.325, 0)],
	['EWT', (r) => fix(r.waterIn, 2)],
	['LWT', (r) => fix(r.waterOut, 2)],
	['SCT', (r) => fix(r.condSat, 2)],
	['Cond press kPa', (r) => fix(r.condKpa - 101.325, 0)],
	['ECWT', (r) => fix(r.condIn, 2)],
	['Cond LWT', (r) => fix(r.condOut, 2)],
	['Oil temp', (r) => fix(r.oil, 1)],
	['EXV %', (r) => fix(r.valve, 0)],
	['Fault', (r) => r.alarm]
];

const formats = new Map<string, Intl.DateTimeFormat>();

/** Wall clock of an instant in a zone, as parts. */
export function wallParts(t: number, zone: string): Record<string, string> {
	let format = formats.get(zone);
	if (!format) {
		format = new Intl.DateTimeFormat('en-GB', {
			timeZone: zone,
			hourCycle: 'h23',
			year: 'numeric',
			month: '2-digit',
			day: '2-digit',
			hour: '2-digit',
			minute: '2-digit',
			second: '2-digit'
		});
		formats.set(zone, format);
	}
	return Object.fromEntries(format.formatToParts(t).map((p) => [p.type, p.value]));
}

/** Writers of stamps for tests. */
export const STAMPS = {
	iso: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		return `${p.year}-${p.month}-${p.day} ${p.hour}:${p.minute}:${p.second}`;
	},
	isoZ: (t: number) => new Date(t).toISOString(),
	us12: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		const h = Number(p.hour);
		return `${Number(p.month)}/${Number(p.day)}/${p.year} ${h % 12 || 12}:${p.minute}:${p.second} ${h < 12 ? 'AM' : 'PM'}`;
	},
	dayFirst: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		return `${p.day}.${p.month}.${p.year} ${p.hour}:${p.minute}:${p.second}`;
	},
	dayFirstSlash: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		return `${p.day}/${p.month}/${p.year} ${p.hour}:${p.minute}`;
	},
	epoch: (t: number) => String(t / 1000),
	month: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		const name = new Intl.DateTimeFormat('en-US', { timeZone: zone, month: 'short' }).format(t);
		return `${p.day}-${name}-${p.year} ${p.hour}:${p.minute}:${p.second}`;
	},
	serial: (t: number, zone: string) => {
		const p = wallParts(t, zone);
		const ms = Date.UTC(
			Number(p.year),
			Number(p.month) - 1,
			Number(p.day),
			Number(p.hour),
			Number(p.minute),
			Number(p.second)
		);
		return ((ms - Date.UTC(1899, 11, 30)) / 86_400_000).toFixed(9);
	}
};

/** A wide table as text. */
export function wideText(
	rows: readonly PlantRow[],
	fields: readonly Field[],
	stamp: (t: number) => string,
	options: { delimiter?: string; decimalComma?: boolean; eol?: string; quote?: boolean; timeName?: string } = {}
): string {
	const { delimiter = ',', decimalComma = false, eol = '\n', quote = false, timeName = 'Time' } = options;
	const cell = (text: string) => {
		const localised = decimalComma && /^-?\d+\.\d+$/.test(text) ? text.replace('.', ',') : text;
		return quote ? `"${localised}"` : localised;
	};
	const lines = [[timeName, ...fields.map(([name]) => name)].map((n) => (quote ? `"${n}"` : n)).join(delimiter)];
	for (const row of rows)
		lines.push([stamp(row.t), ...fields.map(([, value]) => value(row))].map(cell).join(delimiter));
	return lines.join(eol) + eol;
}
