import { randomBytes } from 'node:crypto';
import { QueryTypes, type Sequelize } from 'sequelize';
import { migrate } from '#server/db/migrator.ts';
import { openDatabase } from '#server/db/sequelize.ts';
import { workerDatabase } from './test-app.ts';

/** A migrated register that no other test writes into, as its least-privileged account. */
export interface OwnDatabase {
  database: Sequelize;
  drop(): Promise<void>;
}

/** Makes a register of its own for a test that fills it from empty. */
export async function ownDatabase(): Promise<OwnDatabase> {
  const worker = openDatabase(workerDatabase().ownerUrl, 1);
  const name = `exagium_own_${randomBytes(5).toString('hex')}`;
  const password = randomBytes(12).toString('hex');
  await worker.query(`CREATE DATABASE \`${name}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_uca1400_ai_ci`);
  await worker.query(`CREATE USER '${name}'@'127.0.0.1' IDENTIFIED BY '${password}'`, {
    type: QueryTypes.RAW,
  });
  const ownerUrl = new URL(workerDatabase().ownerUrl);
  ownerUrl.pathname = `/${name}`;
  const applicationUrl = new URL(ownerUrl);
  applicationUrl.username = name;
  applicationUrl.password = password;
  await migrate(ownerUrl.href, applicationUrl.href);
  const database = openDatabase(applicationUrl.href, 4);
  return {
    database,
    drop: async () => {
      await database.close();
      await worker.query(`DROP DATABASE \`${name}\``);
      await worker.query(`DROP USER '${name}'@'127.0.0.1'`);
      await worker.close();
    },
  };
}
