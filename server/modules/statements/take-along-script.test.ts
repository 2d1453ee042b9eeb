import { createHash } from 'node:crypto';
import { runInNewContext } from 'node:vm';
import { describe, expect, it } from 'vitest';
import { TAKE_ALONG_SCRIPT } from './take-along-script.ts';

const hash = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');

/** Runs the script on a page that holds these contents, with the hashes of `noted`. */
function verdictOn(page: { chain: string; said: string; shown?: string }, noted = page) {
  const content = hash(noted.chain);
  const verdict = {
    textContent: '',
    className: '',
    dataset: { content, said: hash(noted.said.replace(/\s+/g, '')) },
  };
  const elements: Record<string, { textContent: string }> = {
    verdict,
    chain: { textContent: page.chain },
    said: { textContent: page.said },
    sha256: { textContent: page.shown ?? content },
  };
  runInNewContext(TAKE_ALONG_SCRIPT, {
    document: { getElementById: (id: string) => elements[id] },
    TextEncoder,
    DataView,
    Uint8Array,
    Int32Array,
    Math,
  });
  return verdict;
}

describe('what a page to take along verifies by itself', () => {
  it.each(['', 'a', '{"µ":"− ± 😀"}', 'x'.repeat(55), 'x'.repeat(56), 'x'.repeat(64), 'y'.repeat(100_003)])(
    'finds its content unchanged (%#)',
    (chain) => {
      const verdict = verdictOn({ chain, said: ' words\n and\tmore ' });
      expect(verdict).toMatchObject({
        className: 'holds',
        textContent: 'The content of this page matches its hash.',
      });
    },
  );

  it('finds one digit changed in its data', () => {
    const noted = { chain: '{"deviation":"0.000123"}', said: 'words' };
    const verdict = verdictOn({ ...noted, chain: '{"deviation":"0.000124"}' }, noted);
    expect(verdict.className).toBe('broken');
    expect(verdict.textContent).toContain('does not match its hash: its data were changed');
  });

  it('finds one digit changed in its words, and a hash shown that is not its own', () => {
    const noted = { chain: '{}', said: 'U = 110 µg' };
    expect(verdictOn({ ...noted, said: 'U = 100 µg' }, noted).textContent).toContain(
      'its words were changed',
    );
    expect(verdictOn({ ...noted, shown: 'f'.repeat(64) }, noted).className).toBe('broken');
  });

  it('does not mind white space, which editors change', () => {
    const noted = { chain: '{}', said: 'a b\nc' };
    expect(verdictOn({ ...noted, said: 'a  b c\n' }, noted).className).toBe('holds');
  });
});
