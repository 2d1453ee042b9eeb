import { randomBytes } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import type { TestProject } from 'vitest/node';
import { migrate } from '#server/db/migrator.ts';
import { openDatabase } from '#server/db/sequelize.ts';

const WORKERS = 2;

declare module 'vitest' {
  export interface ProvidedContext {
    /** One database per worker: as its owner, and as the least-privileged application. */
    databases: { ownerUrl: string; applicationUrl: string }[];
  }
}

/**
 * Makes one migrated database per worker on the MariaDB of TEST_DATABASE_OWNER_URL, each with its own
 * application account, and removes them afterwards. Names carry a random part, so runs may overlap.
 */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const ownerUrl = process.env.TEST_DATABASE_OWNER_URL;
  if (!ownerUrl) {
    throw new Error(
      'TEST_DATABASE_OWNER_URL is not set: run "npm test", or name a MariaDB account that may create databases.',
    );
  }
  const run = randomBytes(4).toString('hex');
  const owner = openDatabase(ownerUrl, 2);
  const made: { name: string; user: string; ownerUrl: string; applicationUrl: string }[] = [];
  for (let worker = 1; worker <= WORKERS; worker += 1) {
    const name = `exagium_test_${run}_${worker}`;
    const password = randomBytes(12).toString('hex');
    await owner.query(`CREATE DATABASE \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_uca1400_ai_ci`);
    await owner.query(`CREATE USER '${name}'@'127.0.0.1' IDENTIFIED BY '${password}'`, {
      type: QueryTypes.RAW,
    });
    const databaseOwner = new URL(ownerUrl);
    databaseOwner.pathname = `/${name}`;
    const application = new URL(databaseOwner);
    application.username = name;
    application.password = password;
    await migrate(databaseOwner.href, application.href);
    made.push({ name, user: name, ownerUrl: databaseOwner.href, applicationUrl: application.href });
  }
  project.provide('databases', made);
  return async () => {
    for (const { name, user } of made) {
      await owner.query(`DROP DATABASE \`${name}\``);
      await owner.query(`DROP USER '${user}'@'127.0.0.1'`);
    }
    await owner.close();
  };
}
