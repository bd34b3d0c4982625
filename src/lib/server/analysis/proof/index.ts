export { BE_THERE, beThereBy, weekdayKind, type WeekdayKind } from './be-there-by';
export { eThreshold, eValue } from './e-value';
export { prove, type Proof, type ProofInput } from './prove';
export { repeaters, type Repeater, type RepeaterInput } from './repeaters';
