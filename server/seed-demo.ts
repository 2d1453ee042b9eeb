import { seedDemoNetwork } from '#seeders/demo/seed.ts';
import { readConfig } from './config.ts';
import { readRow } from './db/read.ts';
import { openDatabase } from './db/sequelize.ts';

const config = readConfig();
const database = openDatabase(config.databaseUrl, 2);
try {
  const known = await readRow<{ id: string }>(database, 'SELECT id FROM laboratory LIMIT 1');
  if (known) console.log('The register holds laboratories already; nothing was added.');
  else await seedDemoNetwork(database, (line) => console.log(line));
} finally {
  await database.close();
}
