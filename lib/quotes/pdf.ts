/** The PDF of a revision, made once before it is sent and served ever after. */
import { renderToBuffer } from '@react-pdf/renderer';
import { createElement } from 'react';
import { registerFonts } from '@/components/pdf/fonts';
import { QuotePdf } from '@/components/pdf/quote-pdf';
import type { QuoteContent } from './schema/content';

export async function renderQuotePdf(content: QuoteContent): Promise<Uint8Array> {
  registerFonts();
  return renderToBuffer(createElement(QuotePdf, { content }) as Parameters<typeof renderToBuffer>[0]);
}
