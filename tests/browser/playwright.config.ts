import { defineConfig } from '@playwright/test';

const ARGS = [
	'--no-sandbox',
	'--disable-gpu',
	'--disable-quic',
	'--no-first-run',
	'--disable-background-networking',
	'--disable-component-update',
	'--disable-sync'
];

export default defineConfig({
	testDir: '.',
	globalSetup: './support/start.ts',
	outputDir: '/tmp/firstpull-browser-results',
	workers: 1,
	// Pictures first, of the demo as it was loaded: the walks after them add units and notes.
	projects: [
		{ name: 'pictures', testMatch: /pictures\.spec/ },
		{ name: 'walks', testIgnore: /pictures\.spec/ }
	],
	retries: 0,
	timeout: 60_000,
	reporter: [
		['list'],
		...(process.env.RESULTS_FILE ? ([['json', { outputFile: process.env.RESULTS_FILE }]] as const) : [])
	],
	use: {
		launchOptions: { executablePath: '/usr/bin/chromium', args: ARGS },
		timezoneId: 'America/Chicago',
		locale: 'en-US',
		screenshot: 'off',
		trace: 'off'
	}
});
