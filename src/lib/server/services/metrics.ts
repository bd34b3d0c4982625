import { JOBS, queue } from '$lib/server/jobs/queue';
import { collectDefaultMetrics, Gauge, Registry } from 'prom-client';

const registry = new Registry();
collectDefaultMetrics({ register: registry });

new Gauge({
	name: 'firstpull_jobs_waiting',
	help: 'Jobs waiting in each queue',
	labelNames: ['queue'],
	registers: [registry],
	async collect() {
		const boss = await queue();
		for (const name of Object.values(JOBS)) this.set({ queue: name }, await boss.getQueueSize(name));
	}
});

/** This process's metrics as Prometheus text. */
export async function metricsText(): Promise<{ text: string; type: string }> {
	return { text: await registry.metrics(), type: registry.contentType };
}
