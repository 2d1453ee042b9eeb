import { describe, expect, it } from 'vitest';
import { contentDisposition, safePdfName } from './file-name.ts';

describe('the name of a document', () => {
  it.each([
    ['certificate.pdf', 'certificate.pdf'],
    ['HB 2026-17', 'HB 2026-17.pdf'],
    ['Prüfschein Nr. 7.PDF', 'Prüfschein Nr. 7.pdf'],
    ['../../etc/passwd', 'etc passwd.pdf'],
    ['..\\..\\boot.ini', 'boot.ini.pdf'],
    ['a"b\r\nSet-Cookie: x', 'a b Set-Cookie x.pdf'],
    ['invoice\u202efdp.exe', 'invoice fdp.exe.pdf'],
    ['....', 'document.pdf'],
    ['', 'document.pdf'],
    [`${'x'.repeat(300)}.pdf`, `${'x'.repeat(120)}.pdf`],
  ])('%j becomes %j', (name, safe) => {
    expect(safePdfName(name)).toBe(safe);
  });

  it('does not cut a character in two', () => {
    expect(safePdfName('😀'.repeat(200))).toBe(`${'😀'.repeat(120)}.pdf`);
  });

  it.each(['a.pdf', 'ä ö.pdf', '😀', '%41%0d%0a', "it's (1)*.pdf", '\ud800'])(
    '%j makes a header of plain ASCII',
    (name) => {
      const header = contentDisposition(name);
      expect(header).toMatch(/^inline; filename="[\x20-\x7e]+\.pdf"; filename\*=UTF-8''[A-Za-z0-9%._~-]+$/);
      expect(header.split('"')).toHaveLength(3);
    },
  );
});
