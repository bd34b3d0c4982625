import { snapTo, stepSample } from '$lib/utils/nearest-sample';
import { toPixel } from '$lib/utils/paper-scale';
import type { StartSheet } from '$lib/model/wire/start-sheet';
import type { SheetState } from './sheet-state.svelte';

/** Moves the cursor by stored readings. */
export function stepCursor(sheet: SheetState, samples: number): void {
	const { main, view } = sheet;
	if (!main) return;
	const at = snapTo(main.stops, main.startMs + view.cursor * 1000);
	const seconds = (stepSample(main.stops, at, samples) - main.startMs) / 1000;
	view.moveCursor(seconds);
	view.keepInView(seconds);
}

/** Lays the last ghost underneath, or takes it away. */
export function toggleGhost(sheet: SheetState): void {
	const { view } = sheet;
	const shown = view.ghost !== null && view.ghost !== 'none';
	view.ghost = shown ? 'none' : (sheet.data.held[0]?.id ?? 'none');
}

function typing(event: KeyboardEvent): boolean {
	const target = event.target as HTMLElement | null;
	return target?.closest('input, textarea, select, [contenteditable], dialog') !== null && target !== null;
}

/** Keys of a start sheet: arrows the cursor, + and − zoom, Home the first view, n and p the next and previous start, g the ghost. */
export function sheetKeys(
	event: KeyboardEvent,
	sheet: SheetState,
	neighbours: StartSheet['neighbours'],
	go: (id: string | undefined) => void
): void {
	if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey || typing(event)) return;
	const { view } = sheet;
	const middle = view.scale ? toPixel(view.scale, view.cursor) : 0;
	const actions: Record<string, () => void> = {
		ArrowLeft: () => stepCursor(sheet, event.shiftKey ? -10 : -1),
		ArrowRight: () => stepCursor(sheet, event.shiftKey ? 10 : 1),
		'+': () => view.zoomAt(middle, 1.5),
		'=': () => view.zoomAt(middle, 1.5),
		'-': () => view.zoomAt(middle, 1 / 1.5),
		'−': () => view.zoomAt(middle, 1 / 1.5),
		Home: () => view.home(),
		n: () => go(neighbours.next?.id),
		p: () => go(neighbours.previous?.id),
		g: () => toggleGhost(sheet)
	};
	const action = actions[event.key];
	if (!action) return;
	event.preventDefault();
	action();
}
