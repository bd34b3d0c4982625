import {
	DeleteObjectCommand,
	GetObjectCommand,
	HeadBucketCommand,
	PutObjectCommand,
	S3Client,
	type S3ClientConfig
} from '@aws-sdk/client-s3';
import type { Config } from '$lib/server/config';
import { createReadStream } from 'node:fs';
import { stat, unlink } from 'node:fs/promises';
import type { ObjectStore } from './types';

function clientFor(settings: Config): S3Client {
	const options: S3ClientConfig = {
		region: settings.S3_REGION,
		forcePathStyle: true,
		// The SDK's default appends checksum trailers that many S3 services store as part of the object.
		requestChecksumCalculation: 'WHEN_REQUIRED',
		responseChecksumValidation: 'WHEN_REQUIRED'
	};
	if (settings.S3_ENDPOINT) options.endpoint = settings.S3_ENDPOINT;
	if (settings.S3_ACCESS_KEY && settings.S3_SECRET_KEY) {
		options.credentials = { accessKeyId: settings.S3_ACCESS_KEY, secretAccessKey: settings.S3_SECRET_KEY };
	}
	return new S3Client(options);
}

/** An S3 bucket as object store. */
export function s3Store(settings: Config): ObjectStore {
	const client = clientFor(settings);
	const Bucket = settings.S3_BUCKET;
	return {
		async keepFile(key, path) {
			const { size } = await stat(path);
			await client.send(new PutObjectCommand({ Bucket, Key: key, Body: createReadStream(path), ContentLength: size }));
			await unlink(path);
		},
		async keep(key, bytes) {
			await client.send(new PutObjectCommand({ Bucket, Key: key, Body: bytes, ContentLength: bytes.length }));
		},
		async *open(key) {
			const { Body } = await client.send(new GetObjectCommand({ Bucket, Key: key }));
			if (!Body) throw new Error(`the store has no object ${key}`);
			yield* Body as unknown as AsyncIterable<Uint8Array>;
		},
		async remove(key) {
			await client.send(new DeleteObjectCommand({ Bucket, Key: key }));
		},
		async answers() {
			try {
				await client.send(new HeadBucketCommand({ Bucket }));
				return true;
			} catch {
				return false;
			}
		}
	};
}
