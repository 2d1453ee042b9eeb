import { readFileSync } from 'node:fs';

/** Kills the server that it was given and waits until another answers at the same address. */
const pid = () => Number(readFileSync(process.env.SERVER_PID_FILE ?? '', 'utf8'));
const health = async () => (await fetch(`${process.env.BASE_URL}/api/health`)).json();

console.log('before', JSON.stringify(await health()));
const first = pid();
process.kill(first, 'SIGKILL');
while (pid() === first) await new Promise((resolve) => setTimeout(resolve, 20));
console.log('after', JSON.stringify(await health()));
