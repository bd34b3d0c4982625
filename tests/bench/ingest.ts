/** `npm run bench -- ingest`: the targets on reading, side by side with their peers. */
import { randomUUID } from 'node:crypto';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { chmodSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Papa from 'papaparse';
import { migrate } from '../../src/cli/lib/migrate.mjs';
import { removeCluster, startPostgres } from '../../src/cli/lib/postgres.mjs';
import { capture } from '../../src/cli/lib/run.mjs';
import { inspectLog, readLog, type ReadContext, type SourceFile } from '../../src/lib/server/ingest/index';
import { paired, printRow } from './ratio';
import { referenceLog, type Shape } from './reference-log';

const ROWS = Number(process.env.BENCH_ROWS ?? 120_960);
const TIMES = Number(process.env.BENCH_TIMES ?? 5);
/** One row per sample with its key, in PostgreSQL: measured in a spike, bytes. */
const ROW_PER_SAMPLE = 83;

const context: ReadContext = {
	unit: { unitId: 'u', tag: 'Unit 1', refrigerant: 'R-134a', circuits: 1, ratedAmps: null },
	siblings: [],
	timeZone: 'UTC',
	zoneOverride: null,
	airPressure: 101.325,
	now: Date.UTC(2026, 1, 1),
	remembered: [],
	ask: false
};

const CHUNK = 256 * 1024;
function sourceOf(bytes: Buffer): SourceFile {
	const chunks = function* () {
		for (let i = 0; i < bytes.length; i += CHUNK) yield bytes.subarray(i, i + CHUNK);
	};
	return {
		name: 'reference.csv',
		size: bytes.length,
		async *open() {
			yield* chunks();
		}
	};
}

const nowhere = { block: () => Promise.resolve(), text: () => Promise.resolve(), event: () => Promise.resolve() };

async function parseRow(shape: Shape, rows: number): Promise<void> {
	const { text, samples } = referenceLog(shape, rows);
	const files = [sourceOf(Buffer.from(text))];
	const inspection = await inspectLog(files, context);
	const own = () => readLog(files, context, inspection, inspection.mapping, nowhere, () => undefined);
	const peer = () => Papa.parse(text, { skipEmptyLines: true }).data.length;
	const { ratio, own: a, peer: b } = await paired(own, peer, TIMES);
	const target = shape === 'wide' ? '≤ 0.25' : '—';
	printRow(
		`parse and convert, ${shape} (${samples.toLocaleString('en')} readings)`,
		ratio.toFixed(3),
		target,
		`own ${a.toFixed(2)} s, PapaParse ${b.toFixed(2)} s`
	);
}

async function wholeRows(adminUrl: string, rows: number): Promise<void> {
	const { text } = referenceLog('wide', rows);
	const { actorFor, foundOrganisation } = await import('../../src/lib/server/services/people');
	const { addSite } = await import('../../src/lib/server/services/sites');
	const { addUnit } = await import('../../src/lib/server/services/units');
	const { receiveFile } = await import('../../src/lib/server/services/incoming');
	const { takeLog } = await import('../../src/lib/server/services/logs');
	const { runReading } = await import('../../src/lib/server/services/reading');
	const { runAnalysis } = await import('../../src/lib/server/services/analysing');
	const { Readable } = await import('node:stream');
	await foundOrganisation('Bench', { email: 'bench@firstpull.test', name: 'Bench', password: 'a long enough one' });
	const actor = await actorFor('bench@firstpull.test');
	const site = await addSite(actor, { name: 'Bench', timeZone: 'UTC' });
	const run = async (): Promise<void> => {
		const unit = await addUnit(actor, {
			siteId: site.id,
			tag: randomUUID().slice(0, 8),
			refrigerant: 'R-134a',
			circuits: 1,
			nature: {},
			limits: {}
		});
		const file = await receiveFile(Readable.from([Buffer.from(text)]), 'reference.csv');
		const log = await takeLog(actor, unit.id, [file], { timeZone: null, mapping: 'auto', name: null });
		const touched = await runReading({ organisationId: actor.organisationId, logId: log.id });
		if (!touched) throw new Error('the reference log was not read');
		for (const unitId of touched) await runAnalysis({ organisationId: actor.organisationId, unitId });
	};
	const { ratio, own, peer } = await paired(
		run,
		() => Papa.parse(text, { skipEmptyLines: true }).data.length,
		Math.min(3, TIMES)
	);
	printRow(
		'whole ingest: bytes → blocks → starts and figures',
		ratio.toFixed(2),
		'≤ 0.6',
		`own ${own.toFixed(2)} s, PapaParse ${peer.toFixed(2)} s`
	);
	await pandasRow(text, own);
	await bytesRow(adminUrl);
}

async function pandasRow(text: string, own: number): Promise<void> {
	const file = join(tmpdir(), `firstpull-bench-${process.pid}.csv`);
	await writeFile(file, text);
	const script = `import pandas as pd,time
b=time.time();d=pd.read_csv(${JSON.stringify(file)},parse_dates=['time']);r=(d['Comp Running'].fillna(0).diff()==1).cumsum();d.groupby(r).min(numeric_only=True);print(time.time()-b)`;
	const { code, output } = await capture('python3', ['-c', script]);
	await rm(file);
	if (code !== 0)
		return printRow('the same against a pandas script', 'not run', '≤ 1.0', 'python3-pandas is not installed');
	printRow(
		'the same against a pandas script',
		(own / Number(output.trim())).toFixed(2),
		'≤ 1.0',
		`pandas ${Number(output.trim()).toFixed(2)} s`
	);
}

async function bytesRow(adminUrl: string): Promise<void> {
	const { default: postgres } = await import('postgres');
	const url = new URL(adminUrl);
	url.pathname = '/firstpull';
	const sql = postgres(url.href, { max: 1 });
	// Only readings that are stored count: columns without a signal cost no byte and would flatter the figure.
	const [row] = await sql<{ bytes: string; readings: string }[]>`select
		pg_total_relation_size('blocks') + pg_total_relation_size('block_times') as bytes,
		(select sum(count) from blocks) as readings`;
	await sql.end();
	const perSample = Number(row?.bytes ?? 0) / Number(row?.readings ?? NaN);
	printRow(
		'bytes stored per reading, indexes included, of a row each',
		(perSample / ROW_PER_SAMPLE).toFixed(4),
		'≤ 0.01',
		`${perSample.toFixed(2)} B`
	);
}

/** Peak of resident memory of one reading, in a process of its own. */
async function memoryRow(rows: number): Promise<void> {
	const script = join(import.meta.dirname, 'peak-memory.ts');
	const peak = async (n: number): Promise<number> => {
		const { code, output } = await capture(process.execPath, ['--import', 'tsx', script, String(n)]);
		if (code !== 0) throw new Error(output);
		return Number(output.trim().split('\n').at(-1));
	};
	const once = await peak(rows);
	const tenfold = await peak(rows * 10);
	printRow(
		'peak memory of reading above the same process idle, MB',
		once.toFixed(0),
		'≤ 150',
		`a tenfold file: ${tenfold.toFixed(0)} MB`
	);
}

export async function benchIngest(): Promise<void> {
	for (const shape of ['wide', 'full-precision', 'change-of-value', 'long'] as const)
		await parseRow(shape, shape === 'long' ? Math.round(ROWS / 10) : ROWS);
	await memoryRow(Math.round(ROWS / 10));
	const folder = await mkdtemp(join(tmpdir(), 'firstpull-bench-'));
	chmodSync(folder, 0o755);
	const server = await startPostgres(join(folder, 'postgres'));
	try {
		await migrate(server.url);
		process.env.DATABASE_URL = server.url;
		process.env.DATA_DIR = folder;
		process.env.DEMO = 'off';
		await wholeRows(server.adminUrl, ROWS);
	} finally {
		const { closeQueue } = await import('../../src/lib/server/jobs/queue');
		const { closeDatabase } = await import('../../src/lib/server/repositories/transaction');
		await closeQueue();
		await closeDatabase();
		await server.stop();
		removeCluster(join(folder, 'postgres'));
		await rm(folder, { recursive: true, force: true });
	}
}
