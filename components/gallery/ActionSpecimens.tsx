import Plus from 'lucide-react-native/icons/plus';
import Settings from 'lucide-react-native/icons/settings';
import { useState, type ReactElement } from 'react';
import { Section } from '@/components/gallery/Section';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { confirm } from '@/components/ui/confirm';
import { Dialog } from '@/components/ui/Dialog';
import { IconButton } from '@/components/ui/IconButton';
import { LinkButton } from '@/components/ui/LinkButton';
import { OutsideLink } from '@/components/ui/OutsideLink';
import { Row } from '@/components/ui/Row';
import { Segmented } from '@/components/ui/Segmented';
import { Tabs } from '@/components/ui/Tabs';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';

type Part = 'week' | 'month' | 'season';
const parts = [{ id: 'week', label: 'Week' }, { id: 'month', label: 'Month' }, { id: 'season', label: 'Season' }] as const;

/** Everything that is pressed. */
export function ActionSpecimens(): ReactElement {
  const [open, setOpen] = useState(false);
  const [part, setPart] = useState<Part>('week');
  const [units, setUnits] = useState<'us' | 'metric'>('us');
  const [answer, setAnswer] = useState('');
  return (
    <>
      <Section title="Buttons">
        <Row>
          <Button kind="sun" label="Start the round" />
          <Button kind="hose" label="Save this test" />
          <Button label="Compare with today's plan" />
          <Button kind="danger" label="Water off, stop here" />
          <Button kind="plain" label="Show all" />
        </Row>
        <Row>
          <Button kind="sun" label="Hose moved" pending />
          <Button kind="hose" label="Save this test" pending />
          <Button label="Add a zone" icon={Plus} />
          <Button kind="hose" label="Not allowed here" disabled />
          <Button size="small" label="+10 min" />
          <IconButton icon={Settings} label="Settings" onPress={() => undefined} />
        </Row>
        <Card tone="hero">
          <Text color="onHeroSoft">On the hero card</Text>
          <Button kind="sun" label="Start the round" block />
        </Card>
      </Section>
      <Section title="Links">
        <Text>
          In a sentence: <TextLink href="/does-it-fit">does it fit?</TextLink> And to somewhere else: <OutsideLink href="/api/openapi.json" newTab>the interface description</OutsideLink>.
        </Text>
        <Row>
          <TextLink kind="standalone" href="/cup-test">Try the cup test</TextLink>
          <LinkButton kind="hose" label="Set up your yard" href="/sign-up" />
        </Row>
        <Card style={{ maxWidth: 360 }}>
          <Text variant="strong"><TextLink kind="stretched" href="/cup-test">The whole card is a link</TextLink></Text>
          <Text variant="small">Only its title is one for the keyboard and the ear.</Text>
        </Card>
      </Section>
      <Section title="Choosing a view">
        <Segmented label="Units" showLabel value={units} onChange={setUnits} options={[{ value: 'us', label: 'Inches and gallons' }, { value: 'metric', label: 'Millimetres and litres' }]} />
        <Tabs label="Period" tabs={parts} value={part} onChange={setPart}>
          <Text>{`Water used in this ${part}.`}</Text>
        </Tabs>
      </Section>
      <Section title="Dialogs">
        <Row>
          <Button label="Open a dialog" onPress={() => setOpen(true)} />
          <Button
            kind="danger"
            label="Remove the zone"
            onPress={() => void confirm({ title: 'Remove the zone “North shade”?', body: 'Its tests and its water budget go with it. What was applied stays in the history.', confirmLabel: 'Remove the zone', tone: 'danger' }).then((yes) => setAnswer(yes ? 'Removed.' : 'Kept.'))}
          />
          <Text role="status">{answer}</Text>
        </Row>
        <Dialog
          open={open}
          onClose={() => setOpen(false)}
          title="Ten more minutes"
          actions={
            <>
              <Button kind="hose" label="Add ten minutes" onPress={() => setOpen(false)} />
              <Button label="Leave it at 46" onPress={() => setOpen(false)} />
            </>
          }
        >
          <Text>The next set then starts at 6:46 and the round is done by 7:35.</Text>
        </Dialog>
      </Section>
    </>
  );
}
