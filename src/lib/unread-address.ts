/** Something in an address that could not be read, and what stands in its place. */
export interface Unread {
  name: string;
  received: string;
}

const LONGEST_SHOWN = 60;

/**
 * What an address names and its reader left out or put at its default instead. Numbers are compared as numbers.
 * @param read what was made of the parameters, by name; names that it does not have are no part of the question
 */
export function unreadIn(parameters: URLSearchParams, read: Readonly<Record<string, unknown>>): Unread[] {
  return [...parameters].flatMap(([name, received]) => {
    if (!(name in read) || received === '' || isSame(read[name], received)) return [];
    const isLong = received.length > LONGEST_SHOWN;
    return [{ name, received: isLong ? `${received.slice(0, LONGEST_SHOWN)}…` : received }];
  });
}

function isSame(read: unknown, received: string): boolean {
  if (typeof read === 'number') return read === Number(received);
  if (Array.isArray(read)) return read.length > 0 || received === '[]';
  return read === received;
}

const WORDS: Record<string, readonly [what: string, instead: string]> = {
  day: ['a day that cannot be read', 'today is shown'],
  known: ['a day of knowledge that cannot be read', 'what is known today is shown'],
  thenDay: ['a day to compare with that cannot be read', 'it is left out'],
  thenKnown: ['a day of knowledge to compare with that cannot be read', 'it is left out'],
  changes: ['changes that cannot be read', 'none is supposed'],
  suppose: ['a supposition that cannot be read', 'nothing is supposed'],
  beyond: ['a part of U that cannot be read', '10 % is taken'],
  by: ['a grouping that there is not', 'laboratories are shown'],
};

/** A sentence about it, such as "The address names a day that cannot be read: 9999-99-99; today is shown." */
export function unreadSentence({ name, received }: Unread): string {
  const [what, instead] = WORDS[name] ?? [`something that cannot be read (${name})`, 'it is left out'];
  return `The address names ${what}: ${received}; ${instead}.`;
}
