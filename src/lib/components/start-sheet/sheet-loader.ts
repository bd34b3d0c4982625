import type { StartSheet } from '$lib/model/wire/start-sheet';
import { snapTo } from '$lib/utils/nearest-sample';
import { fetchTraces, type StartTraces, type TraceLevel } from './start-traces';
import type { SheetState } from './sheet-state.svelte';

/** px of a plot on a printed landscape page; the sheet is scaled to the page from the width it was drawn for. */
const PRINTED = { width: 780, narrow: false };

/** Brings the traces of a sheet: of the start, of the ghost, of further starts, at the level the view asks for. */
export class SheetLoader {
	readonly #known = new Map<string, Promise<StartTraces>>();
	readonly #sheets = new Map<string, Promise<StartSheet>>();
	#screen = PRINTED;

	constructor(readonly sheet: SheetState) {}

	#traces(start: { id: string; startedAt: string }, level: TraceLevel): Promise<StartTraces> {
		const key = `${start.id} ${level.after}`;
		const known = this.#known.get(key);
		if (known) return known;
		const wanted = fetchTraces(start, this.sheet.traceKeys, level);
		this.#known.set(key, wanted);
		// A refusal is not kept: the next look asks again.
		wanted.catch(() => this.#known.delete(key));
		return wanted;
	}

	/** Lets the next look ask the server again: something was written on this start. */
	forget(): void {
		this.#known.clear();
	}

	/** The page's part of another start; its figures stand beside this one's. */
	#sheetOf(id: string): Promise<StartSheet> {
		const key = `${id} ${this.sheet.units}`;
		const known = this.#sheets.get(key);
		if (known) return known;
		const wanted = fetch(`/api/starts/${id}?units=${this.sheet.units}`).then(async (answer) => {
			if (!answer.ok) throw new Error(`the held start could not be read: the server answered ${answer.status}`);
			return (await answer.json()) as StartSheet;
		});
		this.#sheets.set(key, wanted);
		wanted.catch(() => this.#sheets.delete(key));
		return wanted;
	}

	/** Runs a load for as long as its reason stands; what arrives late is dropped. Returns the way to stop it. */
	#follow(load: (current: () => boolean) => Promise<void>): () => void {
		let current = true;
		load(() => current).catch((reason: unknown) => {
			if (current) this.sheet.problem = reason instanceof Error ? reason.message : String(reason);
		});
		return () => {
			current = false;
		};
	}

	followMain(): () => void {
		const { sheet } = this;
		const { start } = sheet.data;
		const level = sheet.view.level;
		return this.#follow(async (current) => {
			const traces = await this.#traces(start, level);
			if (!current()) return;
			sheet.main = traces;
			sheet.problem = null;
			sheet.view.settleCursor((s) => (snapTo(traces.stops, traces.startMs + s * 1000) - traces.startMs) / 1000);
		});
	}

	followGhost(): () => void {
		const { sheet } = this;
		const id = sheet.view.ghost;
		const level = sheet.view.level;
		if (id === null || id === 'none') {
			sheet.ghost = null;
			sheet.ghostData = null;
			return () => undefined;
		}
		void sheet.units;
		return this.#follow(async (current) => {
			const data = await this.#sheetOf(id);
			const traces = await this.#traces(data.start, level);
			if (!current()) return;
			sheet.ghostData = data;
			sheet.ghost = traces;
		});
	}

	followFurther(): () => void {
		const { sheet } = this;
		const ids = sheet.view.with;
		const level = sheet.view.level;
		if (ids.length === 0) {
			sheet.further = [];
			return () => undefined;
		}
		return this.#follow(async (current) => {
			const sets = await Promise.all(ids.map(async (id) => this.#traces((await this.#sheetOf(id)).start, level)));
			if (current()) sheet.further = sets;
		});
	}

	/** Before printing the strips are drawn for the page's width, after it for the screen's again. */
	printing(begins: boolean): void {
		const { view } = this.sheet;
		if (begins) this.#screen = { width: view.width, narrow: view.narrow };
		const { width, narrow } = begins ? PRINTED : this.#screen;
		view.width = width;
		view.narrow = narrow;
		view.compact = begins;
	}
}
