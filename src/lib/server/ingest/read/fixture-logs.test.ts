import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { SeriesId } from '$lib/model/signals';
import { context, readBack, sourceFile, unitRef } from '../testing/harness';

/** Invented logs with answers worked by hand: see fixtures/logs/README.md. */
const FOLDER = 'fixtures/logs';
type Expected = {
	circuits?: number;
	rows: number;
	firstAt: string;
	lastAt: string;
	counts: Record<string, number>;
	sum: Record<string, number>;
	bad?: Record<string, number>;
	events?: number;
	problems?: string[];
};
const EXPECTED = JSON.parse(readFileSync(`${FOLDER}/expected.json`, 'utf8')) as Record<string, Expected>;
const read = (name: string, reader: 'auto' | 'exact', piece: number) =>
	readBack(
		[sourceFile(name, readFileSync(`${FOLDER}/${name}`), piece)],
		context({ unit: unitRef('C-1', EXPECTED[name]?.circuits ?? 1) }),
		reader
	);
const iso = (ms: number | null | undefined) => (typeof ms === 'number' ? new Date(ms).toISOString() : null);

describe('small logs', () => {
	it('have an answer each', () => {
		const files = readdirSync(FOLDER).filter((name) => !/\.(md|json)$/.test(name));
		expect(Object.keys(EXPECTED).sort()).toEqual(files.sort());
	});

	it.each(Object.entries(EXPECTED))('%s', async (name, expected) => {
		const got = await read(name, 'auto', 1 << 20);
		expect(got.inspection.questions).toEqual([]);
		expect(got.inspection.decision).toBe('ready');
		expect(got.result).toMatchObject({ rows: expected.rows });
		expect([iso(got.result?.firstAt), iso(got.result?.lastAt)]).toEqual([expected.firstAt, expected.lastAt]);
		const counts: Record<string, number> = {};
		for (const b of got.blocks) {
			const key = `${b.signal}/${b.circuit}`;
			counts[key] = (counts[key] ?? 0) + b.v.filter((x) => !Number.isNaN(x)).length;
		}
		expect(counts).toEqual(expected.counts);
		for (const [key, sum] of Object.entries(expected.sum)) {
			const [signal = '', circuit = '1'] = key.split('/');
			expect([key, got.series(signal as SeriesId, circuit).v.reduce((a, b) => a + b, 0)]).toEqual([key, sum]);
		}
		expect(got.events).toHaveLength(expected.events ?? 0);
		if (expected.bad) expect(got.result?.quality.badValues).toEqual(expected.bad);
		if (expected.problems) expect(got.result?.problems.map((p) => p.kind)).toEqual(expected.problems);
	});

	it.each(Object.keys(EXPECTED))('%s reads alike with both readers, however it is cut', async (name) => {
		const [scanned, exact] = [await read(name, 'auto', 37), await read(name, 'exact', 1 << 20)];
		expect(scanned.result).toEqual(exact.result);
		expect(scanned.blocks).toEqual(exact.blocks);
		expect(scanned.texts).toEqual(exact.texts);
		expect(scanned.events).toEqual(exact.events);
	});
});
