import {
	HOME_WINDOW,
	oneSpeedScale,
	type PaperScale,
	type TimeWindow,
	toSeconds,
	twoSpeedScale
} from '$lib/utils/paper-scale';
import type { SheetAddress } from '$lib/utils/sheet-address';
import { dragWindow, FAST_WINDOW, panBy, zoomAbout } from '$lib/utils/zoom-window';
import type { TraceLevel } from './start-traces';

const DAY = 86_400;

/** What is fetched for a view: the home stretch first, then wider ones as the zoom goes out. */
const LEVELS: readonly TraceLevel[] = [
	{ before: 120, after: 2400, px: 1200 },
	{ before: 1800, after: 7200, px: 1600 },
	{ before: 7200, after: DAY, px: 2400 }
];

/** What of a start sheet is on the screen: the stretch of paper, the cursor, the ghost; the address restores it. */
export class SheetView {
	/** Seconds from the start to its stop; null while it runs. */
	runSeconds: number | null = $state(null);
	tripSeconds: number | null = $state(null);
	/** px of the plot; 0 until the page knows. */
	width = $state(0);
	narrow = $state(false);
	/** Strips are drawn lower, so that a sheet fits its printed page. */
	compact = $state(false);
	/** null: home. */
	window = $state.raw<TimeWindow | null>(null);
	/** The stretch being dragged with the mouse, px. */
	stretch = $state.raw<{ x: number; width: number } | null>(null);
	/** Seconds from the start. */
	cursor = $state(0);
	ghost = $state<string | null>(null);
	with = $state.raw<string[]>([]);
	#cursorChosen = $state(false);

	constructor(address: SheetAddress, runSeconds: number | null, tripSeconds: number | null) {
		this.runSeconds = runSeconds;
		this.tripSeconds = tripSeconds;
		this.window = address.window;
		this.ghost = address.ghost;
		this.with = address.with;
		this.#cursorChosen = address.cursor !== null;
		this.cursor = address.cursor ?? this.firstCursor;
	}

	/** The cursor's first place: 30 s in, or earlier in a shorter run. */
	get firstCursor(): number {
		return Math.min(30, Math.max(0, Math.floor((this.runSeconds ?? 60) / 2)));
	}

	/** The most there is to show. */
	readonly bounds: TimeWindow = $derived({
		from: -7200,
		to: Math.min(DAY, Math.max(HOME_WINDOW.to, (this.runSeconds ?? 7200) + 600))
	});

	/** One speed at home on a phone: the first minutes, with a start-up trip in them. */
	readonly phoneHome: TimeWindow = $derived.by(() => {
		const trip = this.tripSeconds ?? 0;
		const length = Math.max(150, trip < 1200 ? trip * 1.08 + 20 : FAST_WINDOW.to);
		return { from: -Math.max(30, Math.round(length * 0.12)), to: Math.round(length) };
	});

	readonly scale: PaperScale | null = $derived.by(() => {
		if (this.width < 40) return null;
		if (this.window) return oneSpeedScale(this.width, this.window);
		return this.narrow ? oneSpeedScale(this.width, this.phoneHome) : twoSpeedScale(this.width);
	});

	/** The stretch to fetch for what is shown. */
	readonly level: TraceLevel = $derived.by(() => {
		const { from, to } = this.window ?? HOME_WINDOW;
		const fits = LEVELS.find(({ before, after }) => -before <= from && after >= to);
		return fits ?? LEVELS[2] ?? { before: 7200, after: DAY, px: 2400 };
	});

	readonly address: SheetAddress = $derived({
		window: this.window,
		cursor: this.#cursorChosen ? this.cursor : null,
		ghost: this.ghost,
		with: this.with
	});

	/** Puts a cursor that nobody has moved on a stored reading. */
	settleCursor(place: (seconds: number) => number): void {
		if (!this.#cursorChosen) this.cursor = place(this.firstCursor);
	}

	moveCursor(seconds: number): void {
		this.#cursorChosen = true;
		this.cursor = seconds;
	}

	#shown(): TimeWindow {
		return this.window ?? (this.narrow ? this.phoneHome : FAST_WINDOW);
	}

	/** Zooms about a pixel of the plot; from two-speed paper it goes to one speed. */
	zoomAt(px: number, factor: number): void {
		if (!this.scale) return;
		const anchor = toSeconds(this.scale, px);
		const { bounds } = this;
		if (this.window === null && !this.narrow) {
			// The two-speed view already shows 40 min: zooming in takes the speed under the pointer, out the whole of it.
			const from =
				factor < 1
					? HOME_WINDOW
					: anchor <= FAST_WINDOW.to
						? FAST_WINDOW
						: { from: FAST_WINDOW.to, to: HOME_WINDOW.to };
			this.window = zoomAbout(from, factor, anchor, bounds);
			return;
		}
		this.window = zoomAbout(this.#shown(), factor, anchor, bounds);
	}

	zoomBetween(px0: number, px1: number): void {
		if (this.scale) this.window = dragWindow(toSeconds(this.scale, px0), toSeconds(this.scale, px1), this.bounds);
	}

	/** Moves the paper by a share of what is shown. */
	pan(share: number): void {
		const shown = this.#shown();
		this.window = panBy(shown, share * (shown.to - shown.from), this.bounds);
	}

	/** Brings an instant back on the paper when it has left it. */
	keepInView(seconds: number): void {
		const shown = this.window;
		if (!shown || (seconds >= shown.from && seconds <= shown.to)) return;
		this.window = panBy(shown, seconds < shown.from ? seconds - shown.from : seconds - shown.to, this.bounds);
	}

	home(): void {
		this.window = null;
	}
}
