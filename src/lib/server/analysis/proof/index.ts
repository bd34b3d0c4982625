export { beThereBy, weekdayKind } from './be-there-by';
export { prove, type Proof } from './prove';
export { repeaters, type Repeater } from './repeaters';
