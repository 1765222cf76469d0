/** The look of every mail: a sheet on vellum, headings as legend plates, one thing to press. */
import {
  Body,
  Button,
  Container,
  Head,
  Heading,
  Hr,
  Html,
  Preview,
  Section,
  Text,
} from '@react-email/components';
import type { CSSProperties, ReactNode } from 'react';

const INK = '#12201a';
const INK_2 = '#4b5c54';
const TEXT_FACE = "'Atkinson Hyperlegible Next', Verdana, 'DejaVu Sans', sans-serif";
const PLATE_FACE = "'Sofia Sans Extra Condensed', 'Arial Narrow', 'DejaVu Sans Condensed', sans-serif";

const text: CSSProperties = { color: INK, fontSize: '16px', lineHeight: '1.5', margin: '0 0 14px' };

export function MailText({ children, second = false }: { children: ReactNode; second?: boolean }) {
  const quiet = {
    ...text,
    color: INK_2,
    fontSize: '14px',
    overflowWrap: 'anywhere',
    wordBreak: 'break-word',
  } as const;
  return <Text style={second ? quiet : text}>{children}</Text>;
}

export function MailPlate({ children }: { children: string }) {
  return (
    <Heading
      as="h2"
      style={{
        display: 'inline-block',
        backgroundColor: '#14221c',
        borderRadius: '4px',
        color: '#eef4f0',
        fontFamily: PLATE_FACE,
        fontSize: '17px',
        letterSpacing: '0.06em',
        margin: '10px 0',
        padding: '4px 14px',
        textTransform: 'uppercase',
      }}
    >
      {children}
    </Heading>
  );
}

export function MailButton({ href, children }: { href: string; children: string }) {
  return (
    <Section style={{ margin: '6px 0 20px' }}>
      <Button
        href={href}
        style={{
          backgroundColor: '#14221c',
          borderRadius: '6px',
          color: '#eef4f0',
          fontSize: '16px',
          fontWeight: 700,
          padding: '14px 22px',
        }}
      >
        {children}
      </Button>
    </Section>
  );
}

/** Somebody's own words, kept apart from ours. */
export function MailQuoted({ children }: { children: string }) {
  return (
    <Section style={{ borderLeft: '3px solid #bfccc4', margin: '0 0 16px', paddingLeft: '14px' }}>
      {children.split('\n').map((line, index) => (
        <Text key={index} style={{ ...text, margin: '0 0 6px' }}>
          {line}
        </Text>
      ))}
    </Section>
  );
}

export interface MailShop {
  name: string;
  licenceNumber: string;
  email: string;
  phone: string;
  address: string;
}

/** `foot` are the shop's own lines: who writes, and how to reach them. */
export function MailFrame({
  preview,
  title,
  foot,
  children,
}: {
  preview: string;
  title: string;
  foot: readonly string[];
  children: ReactNode;
}) {
  return (
    <Html lang="en">
      <Head />
      <Preview>{preview}</Preview>
      <Body style={{ backgroundColor: '#e6ece8', fontFamily: TEXT_FACE, margin: 0, padding: '24px 8px' }}>
        <Container
          style={{
            backgroundColor: '#f5f8f5',
            border: '1px solid #bfccc4',
            borderRadius: '6px',
            maxWidth: '560px',
            padding: '26px 24px',
          }}
        >
          <Heading
            as="h1"
            style={{
              color: INK,
              fontFamily: PLATE_FACE,
              fontSize: '28px',
              lineHeight: '1.15',
              margin: '0 0 18px',
            }}
          >
            {title}
          </Heading>
          {children}
          <Hr style={{ borderColor: '#bfccc4', margin: '18px 0 12px' }} />
          {foot.map((line) => (
            <Text key={line} style={{ color: INK_2, fontSize: '14px', lineHeight: '1.4', margin: 0 }}>
              {line}
            </Text>
          ))}
        </Container>
      </Body>
    </Html>
  );
}
