import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

/** Relative luminance and contrast ratio as WCAG 2.2 defines them (sRGB). */
function luminance(hex: string): number {
	const channel = (at: number): number => {
		const c = parseInt(hex.slice(at, at + 2), 16) / 255;
		return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
	};
	return 0.2126 * channel(1) + 0.7152 * channel(3) + 0.0722 * channel(5);
}
function contrast(one: string, other: string): number {
	const [light, dark] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [number, number];
	return (light + 0.05) / (dark + 0.05);
}

const css = readFileSync(new URL('./tokens.css', import.meta.url), 'utf8');
/** The tokens of a paper, by the block that begins with its selector. */
function tokens(selector: string): Map<string, string> {
	const block = css.slice(css.indexOf(selector)).split('}')[0] ?? '';
	return new Map(
		[...block.matchAll(/--([a-z0-9-]+): (#[0-9a-f]{6});/g)].map(([, name, hex]) => [name ?? '', hex ?? ''])
	);
}
const PAPERS = {
	day: tokens("[data-paper='day']"),
	night: tokens("\n[data-paper='night']"),
	dark: tokens(":root[data-paper='system']")
};
const FAMILIES = ['load', 'low', 'water', 'high', 'oil', 'electrical'];

it('contrast: black on white is 21, the ratio WCAG gives as the most', () => {
	expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 9);
});

describe.each(Object.entries(PAPERS))('%s paper', (_, paper) => {
	const of = (ink: string, ground: string): number => contrast(paper.get(ink) ?? '', paper.get(ground) ?? '');
	it('text holds 4.5 to 1 on every ground it stands on (WCAG 2.2, 1.4.3)', () => {
		for (const ground of ['paper', 'field', 'band', 'sel'])
			for (const ink of ['ink', 'ink2', 'ink3'])
				expect.soft(of(ink, ground), `${ink} on ${ground}`).toBeGreaterThanOrEqual(4.5);
		for (const ground of ['paper', 'field', 'tripwash'])
			expect.soft(of('trip', ground), `trip on ${ground}`).toBeGreaterThanOrEqual(4.5);
		for (const family of FAMILIES) expect.soft(of(family, 'field'), `label of ${family}`).toBeGreaterThanOrEqual(4.5);
	});
	it('traces, ghosts, frames and focus hold 3 to 1 (WCAG 2.2, 1.4.11)', () => {
		for (const family of FAMILIES)
			expect.soft(of(`ghost-${family}`, 'field'), `ghost of ${family}`).toBeGreaterThanOrEqual(3);
		for (const ink of ['edge', 'focus'])
			for (const ground of ['paper', 'field'])
				expect.soft(of(ink, ground), `${ink} on ${ground}`).toBeGreaterThanOrEqual(3);
	});
});
