/** `npm run bench [-- ingest|method]`: ratios against peers measured in the same run. Never a timed test. */
import { benchIngest } from './ingest';
import { benchTraces } from './traces';

const wanted = process.argv.slice(2);
const BENCHES = { ingest: benchIngest, traces: benchTraces } as const;
for (const [name, bench] of Object.entries(BENCHES)) {
	if (wanted.length > 0 && !wanted.includes(name)) continue;
	console.log(`\n${name}`);
	await bench();
}
