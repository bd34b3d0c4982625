export { CAUTIONS } from './cautions';
export { cluesOfStart, evaluateSuspects } from './evaluate';
export { type SuspectEvidence } from './evidence';
export { nextChecks } from './next-checks';
export { SUSPECT_TABLE } from './table';
