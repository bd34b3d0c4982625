export { tonightsLog, type AdviceInput, type LogPoint, type TonightsLog } from './tonights-log';
