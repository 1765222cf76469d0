/** A sent quote on paper: the same content, in the same order, as the customer's page. */
import { Document, Text, View } from '@react-pdf/renderer';
import { message } from '@/lib/messages';
import { byArea, type QuoteContent } from '@/lib/quotes/schema/content';
import { totalRows } from '@/lib/quotes/schema/present';
import { formatDate, formatMoney } from '@/lib/units';
import { PdfPage, PdfParagraphs, PdfPlate, PdfRow, styles } from './kit';

function Head({ content }: { content: QuoteContent }) {
  const { shop, customer, site, settings } = content;
  const licence = shop.licenceNumber ? message('customer.licence', { licence: shop.licenceNumber }) : '';
  return (
    <View>
      <View style={{ flexDirection: 'row', justifyContent: 'space-between' }}>
        <View>
          <Text style={{ fontWeight: 700 }}>{shop.name}</Text>
          {licence ? <Text>{licence}</Text> : null}
        </View>
        <View style={{ alignItems: 'flex-end' }}>
          {[shop.address, shop.phone, shop.email].filter(Boolean).map((line) => (
            <Text key={line} style={styles.second}>
              {line}
            </Text>
          ))}
        </View>
      </View>
      <Text style={[styles.title, { marginTop: 18 }]}>{content.title}</Text>
      <Text style={[styles.second, { marginTop: 4 }]}>
        {message('customer.quote-line', {
          number: content.number,
          revision: content.revision,
          issued: formatDate(content.issuedOn, settings),
          until: formatDate(content.validUntil, settings),
        })}
      </Text>
      <View style={{ flexDirection: 'row', marginTop: 12 }}>
        <View style={{ flex: 1, paddingRight: 16 }}>
          <Text style={styles.second}>{message('customer.for')}</Text>
          {[customer.name, customer.contactName, customer.address].filter(Boolean).map((line) => (
            <Text key={line}>{line}</Text>
          ))}
        </View>
        <View style={{ flex: 1 }}>
          <Text style={styles.second}>{message('customer.at')}</Text>
          {[site.name, site.address].filter(Boolean).map((line) => (
            <Text key={line}>{line}</Text>
          ))}
        </View>
      </View>
    </View>
  );
}

function Work({ content }: { content: QuoteContent }) {
  const money = (minor: number) => formatMoney(minor, content.settings, { symbol: false });
  const named = content.lines.some((line) => line.area !== '');
  return (
    <>
      <PdfPlate>{message('customer.work')}</PdfPlate>
      {content.scopeNote ? <PdfParagraphs items={[content.scopeNote]} /> : null}
      {byArea(content.lines).map((group) => (
        <View key={group.area}>
          {named || group.area ? (
            <Text style={styles.area} minPresenceAhead={30}>
              {group.area || message('customer.whole-job')}
            </Text>
          ) : null}
          {group.lines.map((line) => (
            <PdfRow key={line.id} figure={money(line.amountMinor)}>
              {line.text}
            </PdfRow>
          ))}
        </View>
      ))}
    </>
  );
}

function Options({ content }: { content: QuoteContent }) {
  if (content.options.length === 0) return null;
  const money = (minor: number) => formatMoney(minor, content.settings, { symbol: false });
  return (
    <>
      <PdfPlate>{message('customer.options')}</PdfPlate>
      {content.options.map((option) => (
        <PdfRow
          key={option.id}
          figure={`+ ${money(option.amountMinor)}`}
          second={message(option.chosen ? 'customer.option-in' : 'customer.option-out')}
        >
          {option.area ? `${option.area}: ${option.text}` : option.text}
        </PdfRow>
      ))}
    </>
  );
}

function Totals({ content }: { content: QuoteContent }) {
  return (
    <View wrap={false}>
      <PdfPlate>{message('customer.price')}</PdfPlate>
      {totalRows(content, content.totals).map((row) => (
        <PdfRow key={row.key} figure={row.amount} strong={row.key === 'total'}>
          {row.label}
        </PdfRow>
      ))}
    </View>
  );
}

function Notes({ title, items }: { title: string; items: readonly string[] }) {
  if (items.length === 0) return null;
  return (
    <>
      <PdfPlate>{title}</PdfPlate>
      <PdfParagraphs items={items} />
    </>
  );
}

export function QuotePdf({ content }: { content: QuoteContent }) {
  const { number, revision, shop } = content;
  const name = message('customer.quote-name', { number, revision });
  return (
    <Document
      title={`${name}, ${content.title}`}
      author={shop.name}
      creator="Lampwright"
      producer="Lampwright"
    >
      <PdfPage
        paper={content.settings.paper}
        footer={`${name} · ${shop.name}`}
        pageOf={(page, pages) => message('customer.page-of', { page, pages })}
      >
        <Head content={content} />
        <Work content={content} />
        <Options content={content} />
        <Totals content={content} />
        <Notes title={message('customer.not-included')} items={content.exclusions} />
        <Notes title={message('customer.assumed')} items={content.assumedCounts} />
        <View style={{ marginTop: 16 }}>
          <PdfParagraphs items={content.cautions} second />
        </View>
      </PdfPage>
    </Document>
  );
}
