import mariadb from 'mariadb';

/** Takes as long as STAND_IN_SEED_MS says, so that a test can cut it short after its first half. */
const connection = await mariadb.createConnection(process.env.DATABASE_URL ?? '');
await connection.query("insert into stand_in values ('first half')");
console.log('first half stored');
await new Promise((resolve) => setTimeout(resolve, Number(process.env.STAND_IN_SEED_MS ?? 0)));
await connection.query("insert into stand_in values ('second half')");
await connection.end();
