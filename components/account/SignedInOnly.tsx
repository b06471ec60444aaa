import { Redirect, usePathname, type Href } from 'expo-router';
import { useEffect, useState, type ReactElement, type ReactNode } from 'react';
import { resumeSession, useSession } from '@/components/data/session';
import { ErrorState } from '@/components/ui/ErrorState';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';

/** Shows its children to a signed-in person; everybody else goes to the sign-in and comes back after it. */
export function SignedInOnly({ children }: { children: ReactNode }): ReactElement {
  const session = useSession();
  const path = usePathname();
  useEffect(() => {
    void resumeSession();
  }, []);
  if (session.status === 'unknown') {
    return <Skeleton label="Looking for your session" height={240} />;
  }
  if (session.status === 'unreachable') {
    return (
      <Screen title="No connection" width="form">
        <ErrorState title="Dapple does not answer just now" detail="The connection may be gone, or the service is being restarted." kept="You are still signed in, and nothing was lost. Water that runs, runs on." onRetry={() => void resumeSession()} />
      </Screen>
    );
  }
  if (session.status === 'signed_out') {
    return <ToSignIn from={path} />;
  }
  return <>{children}</>;
}

/** Leads to the sign-in and remembers where from. The path is taken once: it changes while the page does, and the second one is not where the person was. */
function ToSignIn({ from }: { from: string }): ReactElement {
  const [next] = useState(from);
  return <Redirect href={`/sign-in?next=${encodeURIComponent(next)}` as Href} />;
}
