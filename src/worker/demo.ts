/** Loads the demo once, through the same upload as a person's; or, without the demo, prints the code of the first visit. */
import { now } from '$lib/server/config';
import { closeQueue } from '$lib/server/jobs/queue';
import { closeDatabase } from '$lib/server/repositories/transaction';
import { demoKey, demoState, loadDemoPlant, saveDemoState } from '$lib/server/services/demo-loading';
import { demoSignIns, firstRunCode } from '$lib/server/services/first-run';
import { demoLogs, demoPlan, type DemoFile } from '../../fixtures/demo/index';

const SEED = 20260;
const local = process.env.FIRSTPULL_LOCAL ?? process.env.ORIGIN ?? '';

async function upload(unitId: string, file: DemoFile, key: string): Promise<void> {
	const url = `${local}/api/units/${unitId}/logs?name=${encodeURIComponent(file.name)}`;
	const headers = { authorization: `Bearer ${key}`, 'content-type': file.contentType };
	const answer = await fetch(url, { method: 'POST', headers, body: new Uint8Array(file.bytes) });
	// 409: an earlier, broken-off start brought these very bytes already.
	if (!answer.ok && answer.status !== 409) throw new Error(`${file.name}: ${answer.status} ${await answer.text()}`);
}

async function loadDemo(): Promise<void> {
	const found = await demoState();
	if (found?.state.loaded) return;
	const seed = found?.state.seed ?? SEED;
	const plan = demoPlan(seed, found ? new Date(found.state.today) : now());
	const { organisationId, state } = found ?? (await loadDemoPlant(plan, seed));
	const key = await demoKey();
	for (const unit of plan.units) {
		const unitId = state.unitIds[unit.tag];
		if (unitId) for await (const file of demoLogs(plan, unit)) await upload(unitId, file, key);
	}
	await saveDemoState(organisationId, { ...state, loaded: true });
	console.log('The demo’s logs are uploaded; the worker reads the rest of them now.');
}

async function main(): Promise<void> {
	const code = await firstRunCode();
	if (code) console.log(`First visit: open /first-run and give this code, good for a day: ${code}\n`);
	const demo = await demoSignIns();
	if (!demo) return;
	console.log(`Demo sign-ins: ${demo.emails.join(', ')}\nPassword: ${demo.password}\n`);
	await loadDemo();
}

main()
	.catch((error: unknown) => {
		console.error('demo:', error);
		process.exitCode = 1;
	})
	.finally(async () => {
		await closeQueue();
		await closeDatabase();
	});
