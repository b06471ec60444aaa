import type { ReactElement } from 'react';
import { Section } from '@/components/gallery/Section';
import { textStyles, type TextVariant } from '@/components/theme/textStyles';
import { colors, morning, type ColorName } from '@/components/theme/tokens';
import { Box } from '@/components/ui/Box';
import { Card } from '@/components/ui/Card';
import { Discs } from '@/components/ui/Discs';
import { Logo, LogoMark } from '@/components/ui/Logo';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

const sayings: Record<TextVariant, string> = {
  body: 'South lawn is 0.48 in short and reaches its refill line tomorrow.',
  lead: 'No rain before Wednesday.',
  small: '46 min · 0.42 in',
  label: 'Hours at home',
  strong: 'South lawn, by the maple',
  heading1: 'Two sets, one move. Done by 7:25.',
  heading2: 'Move 11 ft, not 16',
  heading3: 'Next, at 6:36',
  figure: '0.64',
  countdown: '12:40',
};

/** Colours, type, the motif. */
export function LookSpecimens(): ReactElement {
  return (
    <>
      <Section title="Colours">
        <Row role="list" aria-label="Colour tokens" gap={12}>
          {(Object.keys(morning) as ColorName[]).map((name) => (
            <Box key={name} role="listitem" gap={4} style={{ width: 96 }}>
              <Box style={{ height: 48, borderRadius: 12, borderWidth: 1, borderColor: colors.line, backgroundColor: colors[name] }} />
              <Text variant="small">{name}</Text>
            </Box>
          ))}
        </Row>
      </Section>
      <Section title="Type">
        <Card gap={16} padding={20}>
          {(Object.keys(textStyles) as TextVariant[]).map((variant) => (
            <Stack key={variant} gap={0}>
              <Text variant="small">{variant}</Text>
              <Text variant={variant} level="none">{sayings[variant]}</Text>
            </Stack>
          ))}
        </Card>
      </Section>
      <Section title="Cards and the motif">
        <Row gap={16} align="stretch">
          <Card tone="hero" padding={20} style={{ width: 340, maxWidth: '100%', minHeight: 180 }}>
            <Box style={{ position: 'absolute', right: -40, top: -30 }}>
              <Discs width={260} height={260} color="onHero" opacity={0.1} discs={[{ x: 46, y: 34, r: 32 }, { x: 66, y: 62, r: 30 }]} />
            </Box>
            <Text variant="heading2" level={3} color="onHero">Two sets, one move. Done by 7:25.</Text>
            <Text color="onHeroSoft">South lawn is 0.48 in short and reaches its refill line tomorrow.</Text>
          </Card>
          <Card style={{ width: 260, maxWidth: '100%' }}>
            <Text variant="strong">South lawn, shed side</Text>
            <Text variant="small">Oscillating · position 4 · 45 min · 0.41 in</Text>
          </Card>
          <Card tone="seed" style={{ width: 260, maxWidth: '100%' }}>
            <Text variant="strong">Seeded strip: three light doses</Text>
            <Text variant="small">10:00, 1:00 and 3:30 · day 6 of about 10</Text>
          </Card>
          <Card tone="quiet" style={{ width: 260, maxWidth: '100%' }}>
            <Text>North shade: not before Thursday.</Text>
          </Card>
        </Row>
        <Row gap={28}>
          <Logo />
          <Logo size="small" />
          <LogoMark size={64} />
          <Discs width={140} height={90} label="Two overlapping wet circles" discs={[{ x: 38, y: 32, r: 26 }, { x: 64, y: 32, r: 26 }]} />
          <Discs width={140} height={90} color="shade" label="A shadow" discs={[{ x: 30, y: 30, r: 14 }, { x: 46, y: 22, r: 15 }, { x: 58, y: 34, r: 16 }, { x: 40, y: 44, r: 15 }]} />
        </Row>
      </Section>
    </>
  );
}
