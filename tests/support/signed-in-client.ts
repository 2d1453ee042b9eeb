import { DEMO_PASSWORD } from '#seeders/demo/people.ts';

/** Signs in over HTTP as a person of the demo network, for programs that work on the built product. */
export async function demoSession(baseUrl: string, email: string): Promise<{ cookie: string }> {
  const reply = await fetch(`${baseUrl}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', 'X-Requested-With': 'exagium' },
    body: JSON.stringify({ email, password: DEMO_PASSWORD }),
  });
  const cookie = reply.headers.getSetCookie()[0]?.split(';')[0];
  if (!reply.ok || !cookie)
    throw new Error(`Sign-in as ${email} gave ${reply.status}: ${await reply.text()}`);
  return { cookie };
}
