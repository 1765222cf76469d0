/** What every printed document is made of: page, legend plate, row, paragraph. Vector throughout. */
import { Page, StyleSheet, Text, View } from '@react-pdf/renderer';
import type { ReactNode } from 'react';
import { FIGURES, PLATE, TEXT } from './fonts';

const INK = '#12201a';
const INK_2 = '#4b5c54';
const RULE = '#bfccc4';
const PLATE_GROUND = '#14221c';
const PLATE_INK = '#eef4f0';

export const styles = StyleSheet.create({
  page: {
    paddingTop: 44,
    paddingBottom: 60,
    paddingHorizontal: 48,
    fontFamily: TEXT as unknown as string,
    fontSize: 10,
    color: INK,
  },
  title: { fontFamily: PLATE as unknown as string, fontSize: 26, fontWeight: 700, lineHeight: 1.1 },
  plate: {
    alignSelf: 'flex-start',
    flexDirection: 'row',
    alignItems: 'center',
    backgroundColor: PLATE_GROUND,
    borderRadius: 3,
    paddingHorizontal: 7,
    paddingTop: 3,
    paddingBottom: 2,
    marginTop: 16,
    marginBottom: 5,
  },
  plateText: {
    fontFamily: PLATE as unknown as string,
    fontSize: 12.5,
    fontWeight: 700,
    lineHeight: 1.1,
    letterSpacing: 0.8,
    color: PLATE_INK,
    marginHorizontal: 7,
  },
  screw: { width: 3.5, height: 3.5, borderRadius: 2, backgroundColor: '#7d8c84' },
  row: {
    flexDirection: 'row',
    justifyContent: 'space-between',
    borderBottomWidth: 0.6,
    borderBottomColor: RULE,
    paddingVertical: 5,
  },
  rowText: { flexGrow: 1, flexShrink: 1, flexBasis: 0, paddingRight: 16 },
  figure: { fontFamily: FIGURES as unknown as string, textAlign: 'right' },
  area: { fontWeight: 700, marginTop: 8 },
  second: { color: INK_2 },
  paragraph: { marginBottom: 4 },
  footer: {
    position: 'absolute',
    bottom: 28,
    left: 48,
    right: 48,
    flexDirection: 'row',
    justifyContent: 'space-between',
    borderTopWidth: 0.6,
    borderTopColor: RULE,
    paddingTop: 5,
    fontSize: 8.5,
    color: INK_2,
  },
});

/** One page size, a footer with the document's name and "page n of m" on every sheet. */
export function PdfPage({
  paper,
  footer,
  pageOf,
  children,
}: {
  paper: 'letter' | 'a4';
  footer: string;
  pageOf: (page: number, pages: number) => string;
  children: ReactNode;
}) {
  return (
    <Page size={paper === 'letter' ? 'LETTER' : 'A4'} style={styles.page}>
      <View style={styles.footer} fixed>
        <Text>{footer}</Text>
        <Text render={({ pageNumber, totalPages }) => pageOf(pageNumber, totalPages)} />
      </View>
      {/* Not on the page: the renderer multiplies an inherited line height again where page numbers are filled in. */}
      <View style={{ fontSize: 10, lineHeight: 1.4 }}>{children}</View>
    </Page>
  );
}

/** A heading that is never the last thing on a page. */
export function PdfPlate({ children }: { children: string }) {
  return (
    <View style={styles.plate} minPresenceAhead={48} wrap={false}>
      <View style={styles.screw} />
      <Text style={styles.plateText}>{children.toUpperCase()}</Text>
      <View style={styles.screw} />
    </View>
  );
}

/** Words and a figure; a page break never falls inside. */
export function PdfRow({
  children,
  figure,
  strong = false,
  second,
}: {
  children: ReactNode;
  figure: string;
  strong?: boolean;
  second?: string | undefined;
}) {
  const weight = strong ? { fontWeight: 700 as const, fontSize: 13 } : {};
  return (
    <View style={styles.row} wrap={false}>
      <View style={styles.rowText}>
        <Text style={weight}>{children}</Text>
        {second ? <Text style={styles.second}>{second}</Text> : null}
      </View>
      <Text style={[styles.figure, weight]}>{figure}</Text>
    </View>
  );
}

export function PdfParagraphs({ items, second = false }: { items: readonly string[]; second?: boolean }) {
  return (
    <>
      {items.map((item, index) => (
        <Text key={index} style={second ? [styles.paragraph, styles.second] : styles.paragraph}>
          {item}
        </Text>
      ))}
    </>
  );
}
