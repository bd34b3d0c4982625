export { rollingSeason, type OffsetReading, type SeasonTrace } from './rolling-season';
