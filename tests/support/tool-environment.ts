/** What the starter tells a program that works on the built product; see server/boot/README.md. */
export function toolEnvironment(): {
  baseUrl: string;
  databaseUrl: string;
  pidFile: string | null;
  chromium: string;
} {
  const { BASE_URL, DATABASE_URL, SERVER_PID_FILE, CHROMIUM_PATH } = process.env;
  if (!BASE_URL || !DATABASE_URL) {
    throw new Error(
      'BASE_URL and DATABASE_URL are not set: run "npm run bench" or "npm run look", which start the product.',
    );
  }
  return {
    baseUrl: BASE_URL,
    databaseUrl: DATABASE_URL,
    pidFile: SERVER_PID_FILE ?? null,
    chromium: CHROMIUM_PATH ?? '/usr/bin/chromium',
  };
}
