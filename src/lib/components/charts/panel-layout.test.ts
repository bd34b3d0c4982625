import { describe, expect, it } from 'vitest';
import { labelPanel, panelAxis } from './panel-layout';

describe('panelAxis', () => {
	it('prints whole ticks whole and halves with a decimal', () => {
		expect(panelAxis([0, 30], 1).ticks.map(({ label }) => label)).toEqual(['0', '10', '20', '30']);
		expect(panelAxis([0, 1], 1).ticks.map(({ label }) => label)).toEqual(['0.0', '0.5', '1.0']);
	});
});

describe('labelPanel', () => {
	const line = { key: 'a', data: [0, 50, 100].map((x) => ({ x, y: 50 })), ink: 'var(--low)', width: 1, dash: null };
	const ground = {
		width: 100,
		height: 60,
		x: (value: number) => value,
		y: (value: number) => 60 - value,
		levels: [{ key: 'limit', value: 20, text: 'cut-out', ink: 'var(--trip)' }],
		uprights: [],
		startX: 0
	};
	it('labels lines and levels, none over the other', () => {
		const labels = labelPanel([{ ...line, label: 'A' }], ground);
		expect(labels.map(({ key }) => key)).toEqual(['a', 'limit']);
		const level = labels.find(({ key }) => key === 'limit');
		expect(level && (level.y + level.height <= 40 || level.y >= 40)).toBe(true);
	});
	it('leaves a line without words unlabelled', () => {
		expect(labelPanel([line], { ...ground, levels: [] })).toEqual([]);
	});
});
