import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { OutsideLink } from '@/components/ui/OutsideLink';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';

const credits: readonly { what: string; words: string; href: string; licence: string }[] = [
  { what: 'Places', words: 'Names, positions and populations of places from GeoNames.', href: 'https://www.geonames.org', licence: 'Creative Commons Attribution 4.0' },
  { what: 'Weather', words: 'Where the live service is switched on, forecasts come from Open-Meteo.', href: 'https://open-meteo.com', licence: 'Creative Commons Attribution 4.0' },
  { what: 'Sample weather', words: 'Recorded days of Seattle and New York, 2012 to 2015, from NOAA as carried by the vega-datasets package.', href: 'https://github.com/vega/vega-datasets', licence: 'Public domain data; package under BSD 3-Clause' },
  { what: 'Reference evapotranspiration and water balance', words: 'Allen, Pereira, Raes and Smith: Crop evapotranspiration, FAO Irrigation and Drainage Paper 56, 1998.', href: 'https://www.fao.org/4/x0490e/x0490e00.htm', licence: 'Method; no text is reproduced' },
  { what: 'Bricolage Grotesque', words: 'Headings and figures.', href: 'https://github.com/ateliertriay/bricolage', licence: 'SIL Open Font License 1.1' },
  { what: 'Atkinson Hyperlegible Next', words: 'All other text.', href: 'https://www.brailleinstitute.org/freefont/', licence: 'SIL Open Font License 1.1' },
  { what: 'Icons', words: 'Lucide.', href: 'https://lucide.dev', licence: 'ISC' },
];

/** Whose work stands behind the numbers, the names and the letters. */
export function CreditsScreen(): ReactElement {
  return (
    <Screen title="Credits" headline="Built on others’ work" width="text">
      <Stack gap={12}>
        {credits.map(({ what, words, href, licence }) => (
          <Card key={what} gap={4}>
            <Text variant="heading3" level={2}>{what}</Text>
            <Text>{words}</Text>
            <Text variant="small">{licence}</Text>
            <OutsideLink href={href}>{href.replace('https://', '')}</OutsideLink>
          </Card>
        ))}
      </Stack>
    </Screen>
  );
}
