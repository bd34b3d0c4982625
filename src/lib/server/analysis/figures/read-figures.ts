import type { LearnedBracket } from '$lib/model/circuit-input';
import type { Interval } from '$lib/model/series';
import type { Stall } from '$lib/model/start';
import { readAroundStart, readBeforeStart } from './before-start';
import { readHeadroom } from './headroom';
import { readInstants, readMargin, readMosts, readOilNet, readOilSlopes } from './high-and-oil';
import { readPeak, readStartLoading } from './loading';
import {
	readBelowCutout,
	readLeastSaturation,
	readLeastSuperheats,
	readPullDown,
	readSteepestFall,
	readValve
} from './low-side';
import { readSettled, settledStretch } from './settled';
import { emptyFigures, type FigureContext, type Figures } from './sheet';
import { findStall } from './stall';

export type FigureSheet = Figures & { settled: Interval | null; stall: Stall | null };

/** Every figure of a start (method.md, "Figures of a start"), its settled stretch and its stall. `stage`: see stages.ts. */
export function readFigures(context: FigureContext, learned: readonly LearnedBracket[], stage: number): FigureSheet {
	const sheet = emptyFigures();
	for (const read of [
		readStartLoading,
		readPeak,
		readLeastSaturation,
		readSteepestFall,
		readBelowCutout,
		readLeastSuperheats,
		readPullDown,
		readValve,
		readMargin,
		readOilSlopes,
		readMosts,
		readInstants,
		readOilNet,
		readBeforeStart,
		readAroundStart
	]) {
		read(context, sheet);
	}
	const stretch = settledStretch(context);
	readSettled(context, sheet, stretch);
	readHeadroom(context, sheet, learned);
	return { ...sheet, settled: 'from' in stretch ? stretch : null, stall: findStall(context, stage) };
}
