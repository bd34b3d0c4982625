import { snapTo } from '$lib/utils/nearest-sample';
import { toSeconds } from '$lib/utils/paper-scale';
import type { SheetState } from './sheet-state.svelte';

/** A drag shorter than this is a click, px. */
const TWITCH = 6;

/** What hands do on the paper: pointers, wheel and pinch, turned into cursor and zoom. */
export class PaperHand {
	readonly #pointers = new Map<number, number>();
	#dragFrom: number | null = null;
	#panning = false;
	#pinch = 0;

	constructor(readonly sheet: SheetState) {}

	#x(event: PointerEvent | WheelEvent): number {
		const surface = event.currentTarget as HTMLElement;
		return event.clientX - surface.getBoundingClientRect().left;
	}

	/** Puts the cursor on the stored reading nearest to a pixel. */
	#point(x: number): void {
		const { view, main, startMs } = this.sheet;
		if (!view.scale) return;
		const seconds = toSeconds(view.scale, Math.min(Math.max(x, 0), view.scale.width));
		const at = main ? snapTo(main.stops, main.startMs + seconds * 1000) : startMs + seconds * 1000;
		view.moveCursor((at - startMs) / 1000);
	}

	down(event: PointerEvent): void {
		if (event.button !== 0) return;
		const x = this.#x(event);
		this.#pointers.set(event.pointerId, x);
		if (event.pointerType === 'mouse') {
			(event.currentTarget as HTMLElement).setPointerCapture(event.pointerId);
			this.#dragFrom = x;
			this.#panning = event.shiftKey;
		} else if (this.#pointers.size === 2) this.#pinch = this.#spread();
		this.#point(x);
	}

	#spread(): number {
		const [a = 0, b = 0] = [...this.#pointers.values()];
		return Math.max(12, Math.abs(a - b));
	}

	move(event: PointerEvent): void {
		const x = this.#x(event);
		const held = this.#pointers.has(event.pointerId);
		const before = this.#pointers.get(event.pointerId) ?? x;
		if (held) this.#pointers.set(event.pointerId, x);
		if (event.pointerType === 'mouse') this.#mouseMove(x, before);
		else if (this.#pointers.size === 2) this.#pinchMove();
		else if (held) this.#point(x);
	}

	#mouseMove(x: number, before: number): void {
		const { view } = this.sheet;
		if (this.#dragFrom === null) return this.#point(x);
		if (this.#panning) {
			if (view.scale && x !== before) view.pan((before - x) / view.scale.width);
			return;
		}
		const width = Math.abs(x - this.#dragFrom);
		view.stretch = width < TWITCH ? null : { x: Math.min(x, this.#dragFrom), width };
	}

	#pinchMove(): void {
		const spread = this.#spread();
		const [a = 0, b = 0] = [...this.#pointers.values()];
		if (Math.abs(spread - this.#pinch) < 2) return;
		this.sheet.view.zoomAt((a + b) / 2, spread / this.#pinch);
		this.#pinch = spread;
	}

	up(event: PointerEvent): void {
		const x = this.#x(event);
		if (this.sheet.view.stretch && this.#dragFrom !== null) this.sheet.view.zoomBetween(this.#dragFrom, x);
		this.cancel(event);
	}

	cancel(event: PointerEvent): void {
		this.#pointers.delete(event.pointerId);
		this.#dragFrom = null;
		this.sheet.view.stretch = null;
	}

	/** Wheel: zoom about the pointer; sideways or with shift: move the paper. At home, scrolling down moves the page. */
	wheel(event: WheelEvent): void {
		const { view } = this.sheet;
		if (!view.scale) return;
		const sideways = Math.abs(event.deltaX) > Math.abs(event.deltaY) || event.shiftKey;
		if (sideways) {
			const delta = event.deltaX === 0 ? event.deltaY : event.deltaX;
			event.preventDefault();
			return view.pan(delta / view.scale.width / 2);
		}
		if (view.window === null && event.deltaY > 0 && !event.ctrlKey) return;
		event.preventDefault();
		view.zoomAt(this.#x(event), Math.exp(-Math.max(-240, Math.min(240, event.deltaY)) / 400));
	}
}
