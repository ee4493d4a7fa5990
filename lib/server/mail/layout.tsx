import { Body, Button, Container, Head, Html, Link, Preview, Section, Text } from '@react-email/components';
import type { ReactNode } from 'react';

const ink = '#17263a';
const action = '#0f6b5c';
const quiet = '#55636f';
const face = 'Georgia, "Times New Roman", serif';

interface LetterProps {
  /** What a list of mails shows beside the subject. */
  readonly preview: string;
  readonly children: ReactNode;
  readonly button: { readonly label: string; readonly link: string };
  /** Why this came, and what to do if it should not have. */
  readonly reason: string;
}

/** The one form of every mail: what it says, one button, the same link as text, why it came. */
export function Letter({ preview, children, button, reason }: LetterProps) {
  return (
    <Html lang="en">
      <Head />
      <Preview>{preview}</Preview>
      <Body style={{ backgroundColor: '#fbfaf6', color: ink, fontFamily: face, margin: 0 }}>
        <Container style={{ maxWidth: '36rem', padding: '2rem 1rem' }}>
          {children}
          <Section style={{ margin: '1.5rem 0' }}>
            <Button
              href={button.link}
              style={{ backgroundColor: action, color: '#ffffff', padding: '0.75rem 1.25rem' }}
            >
              {button.label}
            </Button>
          </Section>
          <Text style={{ color: quiet, fontSize: '14px' }}>
            If the button does nothing, copy this address:
            <br />
            <Link href={button.link} style={{ color: action, wordBreak: 'break-all' }}>
              {button.link}
            </Link>
          </Text>
          <Text
            style={{ borderTop: '1px solid #c9d1cc', color: quiet, fontSize: '14px', paddingTop: '1rem' }}
          >
            {reason}
          </Text>
        </Container>
      </Body>
    </Html>
  );
}

/** A paragraph of a mail. */
export function Paragraph({ children }: { children: ReactNode }) {
  return <Text style={{ fontSize: '16px', lineHeight: '1.5' }}>{children}</Text>;
}
