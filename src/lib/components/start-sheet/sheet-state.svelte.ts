import { airPressure, type UnitSystem } from '$lib/model/quantities';
import type { TraceKey } from '$lib/model/signals';
import { TRIP_KIND_WORDS } from '$lib/model/words';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import type { Preferences } from '$lib/state/preferences.svelte';
import { formatClock, formatDate, formatElapsed } from '$lib/utils/clock';
import { limitsInForce } from './limits-in-force';
import type { SheetView } from './sheet-view.svelte';
import type { StartTraces } from './start-traces';
import type { SheetFacts } from './strip-layout';
import { stripsOfStart, type StripSpec, tracesOf } from './strips';

/** One start sheet: what the server said of the start, the traces that have arrived, and the view of them. */
export class SheetState implements SheetFacts {
	data: StartSheet = $state.raw() as StartSheet;
	main = $state.raw<StartTraces | null>(null);
	/** The held start underneath. */
	ghost = $state.raw<StartTraces | null>(null);
	/** What the server says of the held start. */
	ghostData = $state.raw<StartSheet | null>(null);
	/** Label widths are true from here on. */
	fontsReady = $state(false);
	/** Further starts on the same axis. */
	further = $state.raw<StartTraces[]>([]);
	/** What went wrong on the way, in the server's words. */
	problem = $state<string | null>(null);
	readonly #preferences: Preferences;

	constructor(
		data: StartSheet,
		readonly view: SheetView,
		preferences: Preferences
	) {
		this.data = data;
		this.#preferences = preferences;
	}

	get units(): UnitSystem {
		return this.#preferences.units;
	}
	get narrow(): boolean {
		return this.view.narrow;
	}

	readonly startMs = $derived(Date.parse(this.data.start.startedAt));
	readonly air = $derived(airPressure(this.data.site.altitude ?? 0));
	readonly limits = $derived(limitsInForce(this.data.unit.limits, this.startMs));
	readonly firstMover = $derived(this.data.firstMover ?? null);
	readonly strips: StripSpec[] = $derived(stripsOfStart(this.data.unit.nature, this.data.start.absentReasons));
	readonly traceKeys: TraceKey[] = $derived(tracesOf(this.strips));
	readonly tripSeconds = $derived(
		this.data.start.trip ? (Date.parse(this.data.start.trip.at) - this.startMs) / 1000 : null
	);
	readonly stopSeconds = $derived(
		this.data.start.endedAt ? (Date.parse(this.data.start.endedAt) - this.startMs) / 1000 : null
	);
	readonly tripLabel = $derived(this.tripSeconds === null ? '' : `trip ${formatElapsed(this.tripSeconds)}`);
	readonly tripFlag = $derived.by(() => {
		const { trip } = this.data.start;
		if (!trip || this.tripSeconds === null) return '';
		const basis = trip.basis === 'inferred' ? ', inferred' : '';
		return `Trip ${formatElapsed(this.tripSeconds)}, ${TRIP_KIND_WORDS[trip.kind]}${basis}`;
	});
	readonly stall = $derived.by(() => {
		const { stall } = this.data.start;
		if (!stall || stall.verdict !== 'stall') return null;
		const { levelPct, demandPct } = stall;
		return { from: Date.parse(stall.from), to: Date.parse(stall.to), levelPct, demandPct };
	});
	readonly others = $derived([
		...(this.ghost ? [{ set: this.ghost, label: 'held' }] : []),
		...this.further.map((set) => ({ set, label: this.startWords(set.startMs) }))
	]);

	get logsHref(): string {
		return `/units/${this.data.unit.id}/logs`;
	}
	get limitsHref(): string {
		return `${this.logsHref}#limits`;
	}

	/** "9 Oct 06:14" of another start, on the site's clock. */
	startWords(at: number | string): string {
		const zone = this.data.site.timeZone;
		return `${formatDate(at, zone).replace(/^\S+\s/, '')} ${formatClock(at, zone)}`;
	}
}
