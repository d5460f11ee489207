import { Body, Container, Head, Hr, Html, Link, Preview, render, Section, Text } from '@react-email/components';
import type { ReactNode } from 'react';
import type { Email } from './types';
import { subjectLine } from './words';

const COLOUR = {
  chalk: '#FBF7F0',
  white: '#FFFFFF',
  humus: '#211A16',
  clay: '#5A4E45',
  fallow: '#85776A',
  gley: '#1D4E63',
} as const;
const FACE = "'Atkinson Hyperlegible Next', 'Segoe UI', Verdana, Arial, sans-serif";
const HEAD_FACE = "Besley, Rockwell, 'Roboto Slab', Georgia, serif";

interface FrameProps {
  /** The line a mailbox shows after the subject. */
  readonly preheader: string;
  readonly heading: string;
  readonly children: ReactNode;
  /** Why this mail came, and how to stop it where it can be stopped. */
  readonly footer: ReactNode;
}

/** The shared sheet: chalk ground, the datum line under the wordmark, no picture anywhere. */
function Frame({ preheader, heading, children, footer }: FrameProps) {
  return (
    <Html lang="en">
      <Head>
        <meta name="color-scheme" content="light" />
      </Head>
      <Preview>{preheader}</Preview>
      <Body
        style={{
          backgroundColor: COLOUR.chalk,
          color: COLOUR.humus,
          fontFamily: FACE,
          margin: 0,
          padding: '24px 12px',
        }}
      >
        <Container style={{ maxWidth: '560px' }}>
          <Text style={{ fontFamily: HEAD_FACE, fontSize: '18px', fontWeight: 600, margin: '0 0 6px' }}>Loamline</Text>
          <Hr style={{ border: 'none', borderTop: `2px solid ${COLOUR.gley}`, margin: '0 0 28px' }} />
          <h1
            style={{ fontFamily: HEAD_FACE, fontSize: '25px', lineHeight: '1.25', fontWeight: 600, margin: '0 0 18px' }}
          >
            {heading}
          </h1>
          {children}
          <Hr style={{ border: 'none', borderTop: `1px solid ${COLOUR.fallow}`, margin: '32px 0 14px' }} />
          <Section style={{ color: COLOUR.clay, fontSize: '14px', lineHeight: '1.5' }}>{footer}</Section>
        </Container>
      </Body>
    </Html>
  );
}

export function Paragraph({ children, quiet = false }: { children: ReactNode; quiet?: boolean }) {
  return (
    <Text
      style={{ fontSize: '17px', lineHeight: '1.55', margin: '0 0 16px', color: quiet ? COLOUR.clay : COLOUR.humus }}
    >
      {children}
    </Text>
  );
}

/** The one next step. */
export function Step({ href, children }: { href: string; children: string }) {
  return (
    <Section style={{ margin: '8px 0 22px' }}>
      <Link
        href={href}
        style={{
          display: 'inline-block',
          backgroundColor: COLOUR.gley,
          color: COLOUR.white,
          fontSize: '17px',
          fontWeight: 700,
          lineHeight: '1.2',
          padding: '14px 20px',
          textDecoration: 'none',
        }}
      >
        {children}
      </Link>
    </Section>
  );
}

export function QuietLink({ href, children }: { href: string; children: string }) {
  return (
    <Link href={href} style={{ color: COLOUR.gley, textDecoration: 'underline' }}>
      {children}
    </Link>
  );
}

/** Label and value in two columns that fold on a narrow screen. */
export function Facts({ rows }: { rows: readonly (readonly [string, string])[] }) {
  return (
    <table
      role="presentation"
      cellPadding={0}
      cellSpacing={0}
      style={{ margin: '0 0 18px', fontSize: '17px', lineHeight: '1.5' }}
    >
      <tbody>
        {rows.map(([label, value]) => (
          <tr key={label}>
            <td style={{ color: COLOUR.clay, padding: '2px 16px 2px 0', verticalAlign: 'top', whiteSpace: 'nowrap' }}>
              {label}
            </td>
            <td style={{ padding: '2px 0', verticalAlign: 'top' }}>{value}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

interface Letter extends FrameProps {
  readonly subject: string;
  readonly text: string;
}

/** Puts a letter into its frame. The text part is given, never derived from the HTML. */
export async function letter({ subject, text, children, ...frame }: Letter): Promise<Email> {
  const html = await render(<Frame {...frame}>{children}</Frame>);
  return { subject: subjectLine(subject), html, text };
}
