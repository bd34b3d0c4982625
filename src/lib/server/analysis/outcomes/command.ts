import type { Circuit } from '../circuit';
import { commandFall } from './evidence';

/**
 * Does the start command tell a normal stop? A plant enable stays on through a trip and a light-load stop alike; a run
 * command drops on a normal stop; a command that only repeats the status drops at every stop, in its very row. Told by
 * behaviour over all stops: it must fall before or at some stops, and not in the row of most stops with a recorded trip.
 * `tripped` is true for a run whose stop has a recorded trip.
 */
export function commandTells(circuit: Circuit, tripped: readonly boolean[]): boolean {
	const command = circuit.input.series.startCommand;
	if (command === undefined) return false;
	let falls = 0;
	let trips = 0;
	let fallsAtTrips = 0;
	circuit.runs.forEach((run, i) => {
		if (run.endedAt === null) return;
		const fellAt = commandFall(command, run, run.endedAt);
		if (fellAt !== null) falls++;
		if (tripped[i] === true) {
			trips++;
			if (fellAt !== null && fellAt > run.lastOn) fallsAtTrips++;
		}
	});
	return falls > 0 && (trips === 0 || fallsAtTrips < 0.5 * trips);
}
