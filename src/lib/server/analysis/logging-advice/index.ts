export { tonightsLog } from './tonights-log';
