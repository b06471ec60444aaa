import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead } from '@/components/data/useApi';
import { useClock } from '@/components/data/useClock';
import { useIsWide } from '@/components/theme/breakpoints';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { SplitView } from '@/components/ui/SplitView';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { MailListResponse, MailResponse } from '@/shared/contracts/messages';
import { instantText } from '@/shared/instantText';
import { MailText } from './MailText';

/** Reads the mail that the demonstration's own mail server has taken in. Nothing of it leaves this machine. */
export function MailScreen(): ReactElement {
  const mails = useRead<MailListResponse>(keys.mails, '/demo/mails', { anonymous: true, everyMs: 5_000 });
  const [chosen, setChosen] = useState<string | null>(null);
  const timeZone = useClock().data?.timeZone ?? 'UTC';
  const isWide = useIsWide();
  const list = mails.data?.mails ?? [];
  // Beside a list there is room for a mail: the newest, until another is chosen.
  const shown = chosen ?? (isWide ? list[0]?.id ?? null : null);
  return (
    <Screen title="Mail of the demonstration" headline={list.length === 0 ? 'No mail yet' : list.length === 1 ? 'One mail' : `${list.length} mails`} kicker="Caught here, sent to nobody">
      {mails.isPending ? <Skeleton label="Loading the mail" lines={4} /> : mails.isError ? (
        <ErrorState title="The mail could not be loaded" detail={errorMessage(mails.error)} onRetry={() => void mails.refetch()} retrying={mails.isFetching} />
      ) : list.length === 0 ? (
        <EmptyState title="Nothing has been sent">Reminders and links appear here the moment they go out.</EmptyState>
      ) : (
        <SplitView
          ratio="narrow-list" listLabel="Mails" detailLabel="Mail"
          list={(
            <ul className="m-list">
              {list.map((mail) => (
                <li key={mail.id}>
                  <button type="button" className="m-item" aria-pressed={mail.id === shown} onClick={() => setChosen(mail.id)}>
                    <span className="m-subject">{mail.subject}</span>
                    <span className="m-to">{`${mail.to} · ${instantText(mail.receivedAt, timeZone, 'us')}`}</span>
                  </button>
                </li>
              ))}
            </ul>
          )}
          detail={shown === null ? null : <Mail mailId={shown} onBack={isWide ? null : () => setChosen(null)} />}
        />
      )}
    </Screen>
  );
}

function Mail({ mailId, onBack }: { mailId: string; onBack: (() => void) | null }): ReactElement {
  const mail = useRead<MailResponse>(keys.mail(mailId), `/demo/mails/${mailId}`, { anonymous: true });
  if (mail.isPending) {
    return <Skeleton label="Loading the mail" lines={6} />;
  }
  if (mail.isError) {
    return <ErrorState title="This mail could not be loaded" detail={errorMessage(mail.error)} onRetry={() => void mail.refetch()} />;
  }
  return (
    <Card padding={20} gap={12}>
      <Stack gap={4}>
        <Text variant="heading3" level={2}>{mail.data.subject}</Text>
        <Text variant="small">{`To ${mail.data.to}, from ${mail.data.from}`}</Text>
      </Stack>
      <MailText text={mail.data.text} />
      {onBack ? <Button label="Back to the list" onPress={onBack} /> : null}
    </Card>
  );
}
