import PDFDocument from 'pdfkit';
import type { Paper } from './set-line.ts';

/** What a document says of itself. Its identifier is made from these: one content, one identifier. */
export interface DocumentWords {
  title: string;
  subject: string;
  /** Names the content, by its hash. */
  keywords: string;
  /** Of the question, never of the making: the same question gives the same bytes. */
  created: Date;
}

/** A PDF without pages. */
export function newPaper({ title, subject, keywords, created }: DocumentWords): Paper {
  return new PDFDocument({
    autoFirstPage: false,
    bufferPages: true,
    pdfVersion: '1.7',
    lang: 'en',
    displayTitle: true,
    info: {
      Title: title,
      Subject: subject,
      Keywords: keywords,
      Creator: 'Exagium',
      Producer: 'Exagium',
      CreationDate: created,
    },
  });
}

/** Closes the document. */
export function finished(paper: Paper): Promise<Buffer> {
  const chunks: Buffer[] = [];
  return new Promise((resolve, reject) => {
    paper.on('data', (chunk: Buffer) => chunks.push(chunk));
    paper.on('end', () => resolve(Buffer.concat(chunks)));
    paper.on('error', reject);
    paper.end();
  });
}
