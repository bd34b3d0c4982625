import { createHash } from 'node:crypto';
import type { Draft } from '../layout/draft';
import type { ColumnMapping, ReadContext, RememberedMapping } from '../types';

/** The header's shape: kind, names and units of every file, whatever their order and how often a shape occurs. */
export function headerSignature(drafts: readonly Draft[]): string {
	const shapes = drafts.map((d) =>
		[d.plan.kind, d.plan.time.order, ...d.header.names, ...d.header.units].join('\u0001')
	);
	const text = [...new Set(shapes)].sort().join('\u0002');
	return createHash('sha256').update(text).digest('hex').slice(0, 32);
}

/** The mapping remembered for a shape, or null. */
export function recall(signature: string, ctx: ReadContext): RememberedMapping | null {
	return ctx.remembered.find((r) => r.headerSignature === signature) ?? null;
}

/** A remembered entry for a column: file names change from week to week, so the column's own name decides. */
export function recallColumn(remembered: RememberedMapping, file: string, column: string): ColumnMapping | null {
	const same = remembered.mapping.filter((m) => m.column === column);
	return same.find((m) => m.file === file) ?? same[0] ?? null;
}
