/** Where originals are kept, byte for byte: a folder by default, any S3 service by environment. */
export type ObjectStore = {
	/** Keeps the file at `path` (which is moved or copied away) under `key`; safe once the promise resolves. */
	keepFile(key: string, path: string): Promise<void>;
	/** Keeps a small object. */
	keep(key: string, bytes: Uint8Array): Promise<void>;
	/** The bytes of an object. @throws Error when there is none */
	open(key: string): AsyncIterable<Uint8Array>;
	remove(key: string): Promise<void>;
	/** Is the store reachable and writable? */
	answers(): Promise<boolean>;
};
