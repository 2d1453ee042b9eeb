import mariadb from 'mariadb';

/** The owner makes one table; the application may read it and add to it. */
const { username } = new URL(process.env.DATABASE_URL ?? '');
const connection = await mariadb.createConnection(process.env.DATABASE_OWNER_URL ?? '');
await connection.query('create table if not exists stand_in (note varchar(100))');
await connection.query(`grant select, insert on stand_in to '${username}'@'127.0.0.1'`);
await connection.end();
