/** An invoice on paper. */
import { Document, Text, View } from '@react-pdf/renderer';
import type { InvoiceContent } from '@/lib/invoices/schema';
import { message } from '@/lib/messages';
import { formatDate, formatMoney } from '@/lib/units';
import { PdfPage, PdfPlate, PdfRow, styles } from './kit';

const title = ({ purpose, number }: InvoiceContent) =>
  message(purpose === 'deposit' ? 'invoice.deposit' : 'invoice.final', { number });

export function InvoicePdf({ content }: { content: InvoiceContent }) {
  const { shop, customer, site, settings } = content;
  const money = (minor: number) => formatMoney(minor, settings, { symbol: false });
  const when = message('invoice.line', {
    issued: formatDate(content.issuedOn, settings),
    due: formatDate(content.dueOn, settings),
  });
  return (
    <Document title={`${title(content)}, ${shop.name}`} author={shop.name} language="en">
      <PdfPage
        paper={settings.paper}
        footer={`${shop.name}, ${title(content)}`}
        pageOf={(page, pages) => message('customer.page-of', { page, pages })}
      >
        <Text style={{ fontWeight: 700 }}>{shop.name}</Text>
        {[
          shop.licenceNumber ? message('customer.licence', { licence: shop.licenceNumber }) : '',
          shop.address,
          shop.phone,
          shop.email,
        ]
          .filter(Boolean)
          .map((line) => (
            <Text key={line} style={styles.second}>
              {line}
            </Text>
          ))}
        <Text style={[styles.title, { marginTop: 18 }]}>{title(content)}</Text>
        <Text style={[styles.second, { marginTop: 4 }]}>{when}</Text>
        <View style={{ marginTop: 12 }}>
          {[customer.name, customer.contactName, customer.address, content.title, site.name]
            .filter(Boolean)
            .map((line, index) => (
              <Text key={`${index}-${line}`}>{line}</Text>
            ))}
        </View>
        <PdfPlate>{message('invoice.total')}</PdfPlate>
        {content.rows.map((row) => (
          <PdfRow key={row.text} figure={money(row.amountMinor)}>
            {row.text}
          </PdfRow>
        ))}
        <PdfRow figure={formatMoney(content.totalMinor, settings)} strong>
          {message('invoice.total')}
        </PdfRow>
      </PdfPage>
    </Document>
  );
}
