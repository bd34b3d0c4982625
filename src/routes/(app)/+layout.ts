import { queryClient } from '$lib/state/queries';
import type { LayoutLoad } from './$types';

/** Adds the store of API answers that every signed-in page shares. */
export const load: LayoutLoad = ({ data }) => ({ ...data, queryClient: queryClient() });
