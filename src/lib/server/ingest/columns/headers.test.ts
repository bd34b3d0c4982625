import { describe, expect, it } from 'vitest';
import { MEASURES } from '$lib/model/quantities';
import { SIGNAL_KEYS, SIGNALS } from '$lib/model/signals';
import { unitRef } from '../testing/harness';
import { unitOf } from '../values/units';
import { guessByName } from './by-name';
import type { HeaderStyle } from './header-styles.fixture';
import { HEADER_STYLES } from './more-header-styles.fixture';
import { OwnerFinder } from './owner';
import { nameParts } from './tokens';

/** What the names of one style are taken for, names alone. */
function guessed(style: HeaderStyle) {
	const parts = style.columns.map(([name]) => nameParts(name));
	const owners = new OwnerFinder(
		unitRef('CH-1', style.circuits),
		[],
		parts.map((p) => p.words)
	);
	return style.columns.map(([name, signal, circuit = '1'], i) => {
		const part = parts[i] ?? { words: [], unitText: '' };
		const owner = owners.owner(part.words);
		const measure = unitOf(part.unitText)?.[0];
		const [best] = guessByName(owner.words, measure ? MEASURES[measure].quantity : null);
		return { name, signal, circuit, guess: best, gotCircuit: owner.circuit };
	});
}

describe('header styles', () => {
	it('are at least thirty', () => expect(HEADER_STYLES.length).toBeGreaterThanOrEqual(30));

	it('are read right in at least 95 of 100 names above 0.8, and few plain names fall below it', () => {
		const all = HEADER_STYLES.flatMap(guessed);
		const sure = all.filter((g) => (g.guess?.sure ?? 0) >= 0.8);
		const right = sure.filter((g) => g.guess?.signal === g.signal && g.circuit === g.gotCircuit);
		expect(right.length / sure.length).toBeGreaterThanOrEqual(0.95);
		const known = all.filter((g) => g.signal !== null);
		const found = known.filter((g) => (g.guess?.sure ?? 0) >= 0.8 && g.guess?.signal === g.signal);
		expect(found.length / known.length).toBeGreaterThanOrEqual(0.95);
	});

	it.each(HEADER_STYLES.map((style) => [style.style, style] as const))('%s', (_, style) => {
		const wrong = guessed(style).filter(
			(g) => (g.guess?.sure ?? 0) >= 0.8 && (g.guess?.signal !== g.signal || g.circuit !== g.gotCircuit)
		);
		// One slip a style is the measured share; two are a hole in the vocabulary.
		expect(wrong.length > 1 ? wrong : []).toEqual([]);
	});

	it("the product's own labels name their signals", () => {
		const wrong = SIGNAL_KEYS.filter((key) => {
			const [best] = guessByName(nameParts(SIGNALS[key].label).words, SIGNALS[key].quantity);
			return best?.signal !== key || best.sure < 0.8;
		});
		expect(wrong).toEqual([]);
	});

	it("the product's own keys name their signals", () => {
		const wrong = SIGNAL_KEYS.filter((key) => {
			const [best] = guessByName(nameParts(key).words, SIGNALS[key].quantity);
			return best?.signal !== key || best.sure < 0.8;
		});
		expect(wrong).toEqual([]);
	});

	it('numbered points say nothing', () => {
		for (let i = 1; i < 40; i++)
			expect(guessByName(nameParts(`Point ${i}`).words, null)[0]?.sure ?? 0).toBeLessThan(0.5);
	});
});
