import { readConfig } from './config.ts';
import { migrate } from './db/migrator.ts';

const config = readConfig();
const report = await migrate(
  config.ownerUrl ?? config.databaseUrl,
  config.databaseUrl,
  config.applicationHost,
);
const applied =
  report.applied.length === 0 ? 'the schema is current' : `applied ${report.applied.join(', ')}`;
console.log(
  `${applied}; the register is ${report.isImmutabilityEnforced ? 'insert-only by grants' : 'NOT insert-only: DATABASE_URL and DATABASE_OWNER_URL name one account'}`,
);
