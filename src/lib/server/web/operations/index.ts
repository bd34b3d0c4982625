import type { Operation } from '../operation';
import * as circle from './circle';
import * as inference from './inference';
import * as logs from './logs';
import * as method from './method';
import * as office from './office';
import * as people from './people';
import * as plant from './plant';
import * as starts from './starts';

/** Every call of the public API, for the OpenAPI document. */
export const OPERATIONS: readonly Operation[] = [
	plant,
	logs,
	starts,
	inference,
	circle,
	office,
	people,
	method
].flatMap((group) => Object.values(group) as Operation[]);
