import { QueryTypes, type Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { migrations } from '#migrations/index.ts';
import { GRANTS } from './grants.ts';
import { openDatabase } from './sequelize.ts';

/** What a migration run did, for the starter to say. */
export interface MigrationReport {
  applied: string[];
  isImmutabilityEnforced: boolean;
}

/**
 * Brings the schema to the newest version as its owner and sets the application's grants anew. Two
 * processes that start together wait for each other.
 * @param applicationHost the host part of the application's account in the database
 */
export async function migrate(
  ownerUrl: string,
  applicationUrl: string,
  applicationHost = '127.0.0.1',
): Promise<MigrationReport> {
  const owner = openDatabase(ownerUrl, 2);
  try {
    await owner.query("SELECT GET_LOCK('exagium-migration', 60)", { type: QueryTypes.SELECT });
    const done = await migrationRunner(owner).up();
    const isImmutabilityEnforced = await setGrants(owner, ownerUrl, applicationUrl, applicationHost);
    return { applied: done.map((step) => step.name), isImmutabilityEnforced };
  } finally {
    await owner.close();
  }
}

/** Umzug over the list of migrations; names are stored without extension, so source and bundle agree. */
export function migrationRunner(database: Sequelize): Umzug<object> {
  return new Umzug({
    migrations: migrations.map((step) => ({
      name: step.name,
      up: () => runAll(database, step.up),
      down: () => runAll(database, step.down),
    })),
    storage: new SequelizeStorage({ sequelize: database, tableName: 'schema_migration' }),
    logger: undefined,
  });
}

async function runAll(database: Sequelize, statements: readonly string[]): Promise<void> {
  for (const statement of statements) await database.query(statement);
}

/** Revokes everything the application holds on this database and grants the list. False where both are one account. */
async function setGrants(
  owner: Sequelize,
  ownerUrl: string,
  applicationUrl: string,
  applicationHost: string,
): Promise<boolean> {
  const application = new URL(applicationUrl);
  if (application.username === new URL(ownerUrl).username) return false;
  const databaseName = `\`${application.pathname.slice(1).replaceAll('`', '``')}\``;
  const account = await quotedAccount(owner, decodeURIComponent(application.username), applicationHost);
  await owner.query(`REVOKE ALL PRIVILEGES ON ${databaseName}.* FROM ${account}`).catch(() => undefined);
  await revokeTableGrants(owner, account, databaseName, application);
  await owner.query(`GRANT SELECT ON ${databaseName}.* TO ${account}`);
  for (const [table, privileges] of Object.entries(GRANTS)) {
    await owner.query(`GRANT ${privileges.join(', ')} ON ${databaseName}.\`${table}\` TO ${account}`);
  }
  return true;
}

async function revokeTableGrants(
  owner: Sequelize,
  account: string,
  databaseName: string,
  application: URL,
): Promise<void> {
  const rows = await owner.query<{ name: string }>(
    `SELECT DISTINCT TABLE_NAME AS name FROM information_schema.TABLE_PRIVILEGES
     WHERE TABLE_SCHEMA = :schema AND GRANTEE = :grantee`,
    {
      type: QueryTypes.SELECT,
      replacements: { schema: application.pathname.slice(1), grantee: account },
    },
  );
  for (const { name } of rows)
    await owner.query(`REVOKE ALL PRIVILEGES ON ${databaseName}.\`${name}\` FROM ${account}`);
}

/** `'user'@'host'`, quoted by the server itself. */
async function quotedAccount(owner: Sequelize, user: string, host: string): Promise<string> {
  const [row] = await owner.query<{ name: string }>(
    "SELECT CONCAT(QUOTE(:user), '@', QUOTE(:host)) AS name",
    {
      type: QueryTypes.SELECT,
      replacements: { user, host },
    },
  );
  if (!row) throw new Error('The database did not quote the account name');
  return row.name;
}
