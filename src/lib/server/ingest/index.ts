export type * from './types';
export { LogRefusal } from './types';
export { sniff } from './container/sniff';
export { inspectLog } from './inspect/inspect-log';
export { readLog } from './read/read-log';
export { decodeTimes, decodeValues, encodeTimes, encodeValues } from './block-codec';
export { mergeBlocks, type DecodedBlock } from './merge-blocks';
