import { methodSchema } from '$lib/model/wire/method';
import { operation } from '../operation';

export const getMethod = operation({
	method: 'get',
	path: '/api/method',
	summary: 'What is computed, how, and where each number comes from, with the cautions',
	right: 'read',
	response: methodSchema
});
