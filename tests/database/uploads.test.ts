import { createHash } from 'node:crypto';
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { uploadInputSchema } from '$lib/model/wire/upload';
import { knownCases } from '../../fixtures/known/index';
import { useFreshDatabase } from './support/fresh';
import { invitedOffice, type Office } from './support/office';

useFreshDatabase();

let office: Office;
beforeAll(async () => {
	office = await invitedOffice('Parts');
});

const bytes = Buffer.from(knownCases()[0]?.csv ?? '');
const service = () => import('$lib/server/services/uploads');
const whole = (fingerprint?: string) =>
	uploadInputSchema.parse({
		files: [{ name: 'week.csv', bytes: bytes.length }],
		...(fingerprint ? { fingerprint } : {})
	});

/** A body that breaks off after some bytes, as a lost connection does. */
function* breaking(part: Buffer, after: number): Generator<Buffer> {
	yield part.subarray(0, after);
	throw new Error('aborted');
}
const objects = (id: string): string[] => {
	const folder = join(process.env.DATA_DIR ?? '', 'objects', office.organisationId, 'uploads', id);
	return existsSync(folder) ? readdirSync(folder) : [];
};

describe('an upload in parts', () => {
	it('keeps what arrived before the connection broke, survives a restart, and is the very bytes in the end', async () => {
		const first = await service();
		const { upload } = await first.beginUpload(office.technician, office.unitId, whole());
		expect(upload).toMatchObject({ received: 0, bytes: bytes.length, logId: null });
		const half = Math.floor(bytes.length / 2);
		const broken = Readable.from(breaking(bytes.subarray(0, half), 5000));
		await first.takePart(office.technician, upload.id, { file: 0, from: 0 }, broken);
		expect((await first.uploadOf(office.technician, upload.id)).received).toBe(5000);

		// A new process knows it from the store alone.
		const { closeDatabase } = await import('$lib/server/repositories/transaction');
		const { closeQueue } = await import('$lib/server/jobs/queue');
		await closeQueue();
		await closeDatabase();
		vi.resetModules();
		const second = await service();
		const after = await second.uploadOf(office.technician, upload.id);
		expect(after.received).toBe(5000);
		await expect(second.finishUpload(office.technician, upload.id)).rejects.toMatchObject({ kind: 'conflict' });
		const rest = Readable.from([bytes.subarray(5000)]);
		const place = { file: 0, from: after.received };
		const full = await second.takePart(office.technician, upload.id, place, rest);
		expect(full.received).toBe(bytes.length);
		const log = await second.finishUpload(office.technician, upload.id);
		expect(log.files[0]?.sha256).toBe(createHash('sha256').update(bytes).digest('hex'));
		expect(log).toMatchObject({ name: 'week.csv', bytes: bytes.length, state: 'received' });
		expect((await second.finishUpload(office.technician, upload.id)).id).toBe(log.id);
		expect(objects(upload.id)).toEqual([]);
	});

	it('takes parts in order only, and no more than was said', async () => {
		const { beginUpload, dropUpload, takePart, uploadOf } = await service();
		const { upload } = await beginUpload(office.technician, office.unitId, whole());
		const send = (from: number, part: Buffer) =>
			takePart(office.technician, upload.id, { file: 0, from }, Readable.from([part]));
		await expect(send(10, bytes.subarray(10, 20))).rejects.toMatchObject({ kind: 'conflict' });
		await expect(send(0, Buffer.concat([bytes, bytes]))).rejects.toMatchObject({ kind: 'too-large' });
		await send(0, bytes.subarray(0, 8000));
		await expect(send(0, bytes.subarray(0, 8000))).rejects.toMatchObject({ kind: 'conflict' });
		expect((await uploadOf(office.technician, upload.id)).received).toBe(8000);
		await dropUpload(office.technician, upload.id);
		expect(objects(upload.id)).toEqual([]);
		await expect(uploadOf(office.technician, upload.id)).rejects.toMatchObject({ kind: 'not-found' });
	});

	it('is given back by its fingerprint, to the person who began it', async () => {
		const { beginUpload, dropUpload, openUploadsOf, uploadOf } = await service();
		const begun = await beginUpload(office.technician, office.unitId, whole('mark-of-this-file'));
		const again = await beginUpload(office.technician, office.unitId, whole('mark-of-this-file'));
		expect(again).toMatchObject({ repeated: true, upload: { id: begun.upload.id } });
		expect(await openUploadsOf(office.technician, office.unitId)).toHaveLength(1);
		expect(await openUploadsOf(office.engineer, office.unitId)).toEqual([]);
		await expect(uploadOf(office.engineer, begun.upload.id)).rejects.toMatchObject({ kind: 'not-found' });
		await dropUpload(office.technician, begun.upload.id);
	});

	it('is refused by its first bytes, its size, and the bytes a unit has', async () => {
		const { beginUpload, finishUpload, takePart, uploadOf } = await service();
		const picture = Buffer.alloc(9000);
		picture.set(Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'));
		const input = uploadInputSchema.parse({ files: [{ name: 'photo.png', bytes: 9000 }] });
		const { upload } = await beginUpload(office.technician, office.unitId, input);
		const part = takePart(office.technician, upload.id, { file: 0, from: 0 }, Readable.from([picture]));
		await expect(part).rejects.toMatchObject({ kind: 'unsupported' });
		await expect(uploadOf(office.technician, upload.id)).rejects.toMatchObject({ kind: 'not-found' });
		expect(objects(upload.id)).toEqual([]);

		const huge = uploadInputSchema.parse({ files: [{ name: 'huge.csv', bytes: 3 * 1024 ** 3 }] });
		await expect(beginUpload(office.technician, office.unitId, huge)).rejects.toMatchObject({ kind: 'too-large' });
		await expect(beginUpload(office.client, office.unitId, whole())).rejects.toMatchObject({ kind: 'forbidden' });

		const same = await beginUpload(office.technician, office.unitId, whole());
		await takePart(office.technician, same.upload.id, { file: 0, from: 0 }, Readable.from([bytes]));
		await expect(finishUpload(office.technician, same.upload.id)).rejects.toMatchObject({
			kind: 'conflict',
			location: expect.stringMatching(/^\/api\/logs\//)
		});
	});

	it('goes with its unit, objects and all', async () => {
		const { beginUpload, takePart } = await service();
		const { addUnit, removeUnit } = await import('$lib/server/services/units');
		const { objectKeysOf } = await import('$lib/server/services/office-export');
		const given = {
			siteId: office.siteId,
			tag: 'Gone',
			refrigerant: 'R-134a',
			circuits: 1,
			nature: {},
			limits: {}
		} as const;
		const unit = await addUnit(office.owner, given);
		const { upload } = await beginUpload(office.technician, unit.id, whole());
		await takePart(office.technician, upload.id, { file: 0, from: 0 }, Readable.from([bytes.subarray(0, 6000)]));
		expect((await objectKeysOf(office.organisationId)).filter((key) => key.includes(upload.id))).toHaveLength(1);
		await removeUnit(office.owner, unit.id);
		expect(objects(upload.id)).toEqual([]);
	});

	it('is thrown away when nobody goes on with it', async () => {
		const { beginUpload, sweepUploads, takePart, uploadOf } = await service();
		const { updateUpload } = await import('$lib/server/repositories/uploads');
		const { withOrganisation } = await import('$lib/server/repositories/transaction');
		const { upload } = await beginUpload(office.technician, office.unitId, whole());
		await takePart(office.technician, upload.id, { file: 0, from: 0 }, Readable.from([bytes.subarray(0, 6000)]));
		await sweepUploads();
		expect(objects(upload.id)).toHaveLength(1);
		await withOrganisation(office.organisationId, (tx) => updateUpload(tx, upload.id, { expiresAt: new Date(0) }));
		await expect(uploadOf(office.technician, upload.id)).rejects.toMatchObject({ kind: 'not-found' });
		await sweepUploads();
		expect(objects(upload.id)).toEqual([]);
	});
});
