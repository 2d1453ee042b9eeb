import { AppError } from '#server/http/app-error.ts';

export const PDF_MEDIA_TYPE = 'application/pdf';
export const PDF_MAXIMUM_BYTES = 20 * 1024 * 1024;

const HEAD = Buffer.from('%PDF-');
const END = Buffer.from('%%EOF');
/** Writers put line ends, some a few bytes more, after the end mark. */
const END_WITHIN = 1024;

/**
 * Refuses what is not a whole PDF, by its content and not by its name: it begins with the header and ends
 * with the end mark (ISO 32000-1, 7.5.2 and 7.5.5).
 * @throws AppError `wrong-media-type`
 */
export function refuseUnlessPdf(content: Buffer): void {
  if (!content.subarray(0, HEAD.length).equals(HEAD)) {
    throw refusal('This is not a PDF: it does not begin with %PDF-.', content.subarray(0, 8));
  }
  if (content.lastIndexOf(END) < content.length - END_WITHIN || !content.includes(END)) {
    throw refusal(
      'This PDF is not complete: its end mark %%EOF is missing. Send it again.',
      content.subarray(-8),
    );
  }
}

function refusal(message: string, seen: Buffer): AppError {
  const received = seen.length === 0 ? 'nothing' : `bytes ${seen.toString('hex')}`;
  return new AppError('wrong-media-type', message, {
    fields: { file: { message, received, expected: 'a whole PDF document', clause: 'ISO 32000-1, 7.5' } },
  });
}
