/** The database of the product on a MariaDB of its own. */
export const databaseName = 'exagium';

/** Owns the tables: runs migrations and gives the application its grants. */
export const ownerName = 'exagium_owner';

/** Serves requests. It begins with no right at all; grants are given after migrations, as data. */
export const applicationName = 'exagium_application';

/** Makes databases and users for tests; exists on test databases only. */
export const adminName = 'exagium_test_admin';

/**
 * The statements that bring the accounts in line with the credentials, run by mariadbd itself before it answers
 * anyone. One statement a line: its init file knows no other form. TCP clients come from 127.0.0.1, which with
 * name resolution off is not "localhost".
 * @param {import('./credentials.js').Credentials} credentials
 * @param {{ withAdmin: boolean }} options
 * @returns {string}
 */
export function accountsSql(credentials, { withAdmin }) {
  const lines = [
    `CREATE DATABASE IF NOT EXISTS ${databaseName} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_520_ci`,
    ...account(ownerName, credentials.ownerPassword),
    `GRANT ALL PRIVILEGES ON ${databaseName}.* TO '${ownerName}'@'127.0.0.1' WITH GRANT OPTION`,
    ...account(applicationName, credentials.applicationPassword),
  ];
  if (withAdmin) {
    lines.push(
      ...account(adminName, credentials.adminPassword),
      `GRANT ALL PRIVILEGES ON *.* TO '${adminName}'@'127.0.0.1' WITH GRANT OPTION`,
    );
  }
  return lines.map((line) => `${line};\n`).join('');
}

/**
 * @param {string} name
 * @param {string} password letters, digits, - and _ only
 * @returns {string[]}
 */
function account(name, password) {
  const user = `'${name}'@'127.0.0.1'`;
  return [
    `CREATE USER IF NOT EXISTS ${user} IDENTIFIED BY '${password}'`,
    `ALTER USER ${user} IDENTIFIED BY '${password}'`,
  ];
}
