export type * from './types';
export { LogRefusal } from './types';
