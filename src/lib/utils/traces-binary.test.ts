import { expect, it } from 'vitest';
import { packTraces, unpackTraces, type BinaryTraces } from './traces-binary';

const trace = (n: number) => ({
	signal: 'evapSaturation',
	label: 'evaporator saturation',
	quantity: 'temperature',
	measure: '°C',
	logging: 'interval' as const,
	derived: false,
	t: Float64Array.from({ length: n }, (_, i) => 1_700_000_000_000 + i * 5000),
	v: Float32Array.from({ length: n }, (_, i) => (i % 4 === 3 ? NaN : i / 2))
});

it('gives back what was packed, with odd counts and breaks', () => {
	const before: BinaryTraces = {
		from: '2026-01-01T00:00:00Z',
		to: '2026-01-01T01:00:00Z',
		spacingSeconds: 5,
		traces: [trace(7), trace(0), trace(4)],
		gaps: [],
		marks: [{ kind: 'start', at: '2026-01-01T00:00:10Z', text: 'Anlauf é' }],
		missing: ['oilTemp'],
		units: { temperature: '°C' }
	};
	expect(unpackTraces(packTraces(before).buffer)).toEqual(before);
});

it('refuses a buffer that ends early', () => {
	const packed = packTraces({
		from: '',
		to: '',
		spacingSeconds: null,
		traces: [trace(9)],
		gaps: [],
		marks: [],
		missing: [],
		units: {}
	});
	expect(() => unpackTraces(packed.buffer.slice(0, packed.length - 16))).toThrow(RangeError);
});
