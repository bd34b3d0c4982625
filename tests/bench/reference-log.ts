/** The reference log of the speed targets (invented): rows every 5 s, 60 columns, 1 % blanks, six on/off columns. */

export type Shape = 'wide' | 'full-precision' | 'change-of-value' | 'long';

const START = Date.UTC(2026, 0, 5);
const NAMES = [
	'Comp Running',
	'Demand %',
	'Slide %',
	'Motor Amps',
	'Evap Sat Temp F',
	'Cond Sat Temp F',
	'Suction Temp F',
	'Discharge Temp F',
	'Oil Temp F',
	'Leaving Water F',
	'Entering Water F',
	'Cond Water In F',
	'Cond Water Out F',
	'Valve Position %'
];

const columnName = (c: number): string => NAMES[c] ?? `Aux ${c}`;

/** A smooth noise without a library, the same on every run. */
function value(c: number, i: number): number {
	const x = Math.sin(i * 0.0007 * (c + 1)) * 20 + Math.sin(i * 0.013 + c) * 3;
	return 60 + x + ((((i * 2654435761 + c * 40503) >>> 0) % 1000) / 1000 - 0.5) * 0.6;
}

const isState = (c: number): boolean => c === 0 || (c > 40 && c < 46);
const onAt = (i: number): boolean => i % 17280 > 5000 && i % 17280 < 13000;

function cell(shape: Shape, c: number, i: number): string {
	if ((i * 31 + c * 17) % 101 === 0 && c > 0) return '';
	if (isState(c)) return onAt(i) ? '1' : '0';
	if (shape === 'change-of-value' && (i + c) % 12 !== 0) return '';
	return shape === 'full-precision' ? String(value(c, i)) : value(c, i).toFixed(1);
}

const stamp = (i: number): string => new Date(START + i * 5000).toISOString().slice(0, 19).replace('T', ' ');

/** The log's text, and how many readings it holds. */
export function referenceLog(shape: Shape, rows: number, columns = 60): { text: string; samples: number } {
	const lines: string[] = [];
	let samples = 0;
	const names = Array.from({ length: columns }, (_, c) => columnName(c));
	lines.push(shape === 'long' ? 'time,point,value' : ['time', ...names].join(','));
	for (let i = 0; i < rows; i++) {
		const at = stamp(i);
		const cells = names.map((_, c) => cell(shape, c, i));
		samples += cells.reduce((n, text) => n + (text === '' ? 0 : 1), 0);
		if (shape !== 'long') lines.push(`${at},${cells.join(',')}`);
		else cells.forEach((text, c) => text !== '' && lines.push(`${at},${names[c]},${text}`));
	}
	return { text: lines.join('\n') + '\n', samples };
}
