/** The one door from services to the database: a transaction bound to an organisation. */
export { closeDatabase, databaseAnswers, withOrganisation, type Tx } from '$lib/server/db/client';
