/** Prints how far resident memory rises, MB, while a log of so many rows is read from a generator. */
import { inspectLog, readLog } from '../../src/lib/server/ingest/index';
import { referenceLog } from './reference-log';

const rows = Number(process.argv[2]);
// One stretch of rows is repeated with rising stamps, so that the source itself needs no memory.
const { text } = referenceLog('wide', 2000);
const lines = text.trimEnd().split('\n');
const head = `${lines[0]}\n`;
const tails = lines.slice(1).map((line) => line.slice(line.indexOf(',')));
const START = Date.UTC(2026, 0, 5);

async function* open(): AsyncGenerator<Buffer> {
	yield Buffer.from(head);
	for (let i = 0; i < rows; i += 1000) {
		let chunk = '';
		for (let k = i; k < Math.min(rows, i + 1000); k++) {
			chunk +=
				new Date(START + k * 5000).toISOString().slice(0, 19).replace('T', ' ') +
				(tails[k % tails.length] ?? '') +
				'\n';
		}
		yield Buffer.from(chunk);
	}
}

const context = {
	unit: { unitId: 'u', tag: 'Unit 1', refrigerant: 'R-134a', circuits: 1, ratedAmps: null },
	siblings: [],
	timeZone: 'UTC',
	zoneOverride: null,
	airPressure: 101.325,
	now: Date.UTC(2027, 0, 1),
	remembered: [],
	ask: false
} as const;
const nowhere = { block: () => Promise.resolve(), text: () => Promise.resolve(), event: () => Promise.resolve() };
const files = [{ name: 'big.csv', size: rows * 300, open }];
const idle = process.memoryUsage().rss;
let peak = idle;
const watch = setInterval(() => (peak = Math.max(peak, process.memoryUsage().rss)), 20);
const inspection = await inspectLog(files, context);
await readLog(files, context, inspection, inspection.mapping, nowhere, () => {
	peak = Math.max(peak, process.memoryUsage().rss);
});
clearInterval(watch);
console.log(((peak - idle) / 1024 ** 2).toFixed(1));
