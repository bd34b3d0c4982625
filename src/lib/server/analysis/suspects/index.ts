export { cautionsFor, CAUTIONS } from './cautions';
export { cluesOfStart, evaluateSuspects, STANDING_LIMITS, type StartClue } from './evaluate';
export { eligibleStarts, isTellingTrip, presentStarts, type SuspectEvidence } from './evidence';
export { SUSPECT_TABLE } from './table';
