import type { ReactElement } from 'react';
import { PublicShell } from '@/components/shell/PublicShell';
import { LinkButton } from '@/components/ui/LinkButton';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Text } from '@/components/ui/Text';

/** For an address that leads nowhere. */
export function NotFoundScreen(): ReactElement {
  return (
    <PublicShell>
      <Screen title="Page not found" headline="There is no page at this address" width="text">
        <Text variant="lead">The link may be old, or a letter may be missing. Nothing you saved is affected.</Text>
        <Row>
          <LinkButton kind="hose" label="Go to the start" href="/" />
        </Row>
      </Screen>
    </PublicShell>
  );
}
