import { exportOffice } from '$lib/server/services/office-export';
import { endpoint } from '$lib/server/web/endpoint';
import * as operations from '$lib/server/web/operations/office';

export const GET = endpoint(
	operations.exportOffice,
	async ({ actor }) =>
		new Response(await exportOffice(actor), {
			headers: {
				'content-type': 'application/zip',
				'content-disposition': 'attachment; filename="office.zip"',
				'cache-control': 'no-store'
			}
		})
);
