import type { ReactElement, ReactNode } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Text } from '@/components/ui/Text';

export interface ErrorStateProps {
  /** What happened, in words: "The plan could not be loaded". */
  title: string;
  /** Why, as far as it is known. */
  detail?: string;
  /** Whether anything was lost. Default says that nothing was. */
  kept?: string;
  /** Tries again; leave out when trying again cannot help. */
  onRetry?: () => void;
  retrying?: boolean;
  /** Further ways on. */
  actions?: ReactNode;
}

/** What a part of a screen shows when it failed: what happened, that nothing was lost, what to do next. */
export function ErrorState({ title, detail, kept = 'Nothing you entered was lost.', onRetry, retrying, actions }: ErrorStateProps): ReactElement {
  return (
    <Card role="alert" padding={20} gap={8}>
      <Text variant="heading3" level={2}>{title}</Text>
      {detail !== undefined && <Text>{detail}</Text>}
      <Text color="inkSoft">{kept}</Text>
      <Row>
        {onRetry && <Button kind="hose" label="Try again" onPress={onRetry} pending={retrying} />}
        {actions}
      </Row>
    </Card>
  );
}
