/**
 * Local stands-in for the hosted services a real office would use, when none is configured.
 * Nothing is needed here until mail and identity arrive.
 */
export async function startLocalServices() {
	return { env: {} };
}
