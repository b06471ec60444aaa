import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Screen } from '@/components/ui/Screen';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';

const pages: readonly { href: string; title: string; words: string }[] = [
  { href: '/cup-test', title: 'Catch-cup test', words: 'What your sprinkler applies, how evenly, and how long to run it. Start here: everything else follows from it.' },
  { href: '/does-it-fit', title: 'Does it fit?', words: 'Whether your lawn fits your tap and your hours, and what would help.' },
  { href: '/calculators/move-distance', title: 'Move distance', words: 'How far to move the sprinkler so that the lawn is even and little falls outside.' },
  { href: '/calculators/hose-and-bucket', title: 'Hose and bucket', words: 'What a bucket tells of your flow, and what a longer or fatter hose would change.' },
  { href: '/calculators/soil-store', title: 'Soil store and run limit', words: 'How much water your soil keeps for the roots, and how fast it may come before it runs off.' },
  { href: '/calculators/water-balance', title: 'Water balance', words: 'When a lawn runs short, day by day and term by term.' },
  { href: '/calculators/seedbed', title: 'Seedbed', words: 'Whether your doses keep new seed moist, whether they wash it, and when it comes up.' },
  { href: '/calculators/sun-exposure', title: 'Sun exposure', words: 'Hours of sun through the year behind house, tree and fence, and what the shade saves.' },
  { href: '/calculators/reference-et', title: 'Reference ET', words: 'How much water one day drew, with every step of the sum.' },
];

/** What can be found out without an account. */
export function CalculatorsScreen(): ReactElement {
  return (
    <Screen title="Calculators" headline="What do you want to find out?">
      <Text color="inkSoft">Nine questions about water, soil, sun and seed. No account, and nothing of it is kept but in this tab.</Text>
      <ul className="k-list">
        {pages.map(({ href, title, words }) => (
          <li key={href}>
            <h2><TextLink kind="stretched" href={href as Href}>{title}</TextLink></h2>
            <p>{words}</p>
          </li>
        ))}
      </ul>
      <Text color="inkSoft">
        Each of them is also part of the <a className="d-link" data-kind="inline" href="/api/docs">API</a>, in SI units, with its steps and what was assumed.
      </Text>
    </Screen>
  );
}
