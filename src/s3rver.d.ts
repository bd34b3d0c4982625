declare module 's3rver' {
	/** The local S3 fake of the tests; it brings no types of its own. */
	export default class S3rver {
		constructor(options: {
			port: number;
			address: string;
			silent: boolean;
			directory: string;
			configureBuckets: { name: string; configs: readonly unknown[] }[];
		});
		run(): Promise<{ port: number }>;
		close(): Promise<void>;
	}
}
