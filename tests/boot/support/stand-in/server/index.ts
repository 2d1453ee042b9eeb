import http from 'node:http';
import mariadb from 'mariadb';

/** Answers the health route and stops as the contract of the boot says: no new work, drain, close, exit 0. */
const pool = mariadb.createPool(process.env.DATABASE_URL ?? '');
const server = http.createServer((_request, response) => {
  pool.query('select note from stand_in').then(
    (rows) =>
      response.end(JSON.stringify({ status: 'ready', notes: rows.map((row: { note: string }) => row.note) })),
    (error) => response.writeHead(503).end(String(error)),
  );
});
server.listen(Number(process.env.PORT), process.env.HOST);
process.on('SIGTERM', () => {
  server.close(() => void pool.end().then(() => process.exit(0)));
  server.closeAllConnections();
});
