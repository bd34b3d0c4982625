import { describe, expect, it } from 'vitest';
import type { Log } from '$lib/model/wire/log';
import { layoutWords, logsTitle, logWords, problemWords, signalLabel, spanWords } from './log-words';

// An invented log.
const log = (over: Partial<Log> = {}): Log => ({
	id: 'l',
	unitId: 'u',
	name: 'a.csv',
	bytes: 10,
	sha256: '',
	files: [],
	state: 'ready',
	progress: 1,
	layout: null,
	mapping: [],
	rows: 12_000,
	samples: 0,
	firstAt: '2026-05-04T00:00:00Z',
	lastAt: '2026-05-10T23:59:00Z',
	quality: { gaps: 0, longestGapSeconds: 0, repeats: 0, outOfOrder: 0, badValues: {}, coverage: 1, conflicts: 0 },
	problems: [],
	createdAt: '2026-05-11T00:00:00Z',
	...over
});

describe('logWords', () => {
	it('counts rows and says what is left', () => {
		expect(logWords(log({ state: 'reading', progress: 0.25 }), 'UTC', 8)).toBe(
			'reading, 12,000 rows, 25\u00a0%, about 8\u00a0s left'
		);
		expect(logWords(log(), 'UTC')).toBe('12,000 rows, Mon 4 May to Sun 10 May');
	});
	it('names line and reason of a refusal', () => {
		const problems = [{ line: 3, column: 'ev', kind: 'x', message: 'is no number' }];
		expect(logWords(log({ state: 'refused', problems }), 'UTC')).toBe('line 3, column ev: is no number');
		expect(problemWords({ line: null, column: null, kind: 'x', message: 'empty' })).toBe('empty');
	});
});

describe('logsTitle', () => {
	it('says first what waits for a person', () => {
		expect(logsTitle([], 'KM-2')).toBe('No log of KM-2 yet: drop one here');
		expect(logsTitle([log({ state: 'needs-mapping' }), log({ state: 'reading' })], 'KM-2')).toBe(
			'1 log waits for a word about columns'
		);
		expect(logsTitle([log(), log({ state: 'reading' })], 'KM-2')).toBe('1 log of KM-2 is being read');
		expect(logsTitle([log(), log({ state: 'refused' })], 'KM-2')).toBe('1 log of 2 could not be read');
		expect(logsTitle([log(), log()], 'KM-2')).toBe('2 logs of KM-2 are in');
	});
});

describe('layoutWords, spanWords, signalLabel', () => {
	it('speaks of a layout as people do', () => {
		const layout = {
			kind: 'wide' as const,
			delimiter: ';',
			decimal: ',' as const,
			encoding: 'utf-8',
			headerLine: 4,
			timeForm: 'day-first',
			timeZone: 'Europe/Berlin',
			intervalSeconds: 60
		};
		expect(layoutWords(layout)).toContain('semicolon between cells, decimal comma, utf-8, header on line 4');
		expect(layoutWords(null)).toBe('The layout is not known yet.');
	});
	it('names one day once', () => {
		expect(spanWords({ firstAt: '2026-05-04T01:00:00Z', lastAt: '2026-05-04T09:00:00Z' }, 'UTC')).toBe('Mon 4 May');
		expect(spanWords({ firstAt: null, lastAt: null }, 'UTC')).toBe('no instant read');
	});
	it('numbers the second of a kind', () => {
		expect(signalLabel('phaseCurrents.2')).toBe('phase currents 2');
		expect(signalLabel('evapWaterOut')).toBe('leaving water');
	});
});
