import '@/components/theme/global.css';
import '@/components/ui/forms.css';
import '@/components/ui/parts.css';
import '@/components/shell/shell.css';
import '@/components/landing/landing.css';
import '@/components/set-up/set-up.css';
import '@/components/today/today.css';
import '@/components/round/round.css';
import '@/components/plan/plan.css';
import '@/components/budget/budget.css';
import '@/components/clock/clock.css';
import '@/components/catch-test/catch-test.css';
import '@/components/bucket-test/bucket-test.css';
import '@/components/fit/fit.css';
import '@/components/mail/mail.css';
import '@/components/yard/yard.css';
import '@/components/yards/yards.css';
import '@/components/establishment/establishment.css';
import '@/components/calculators/calculators.css';
import '@/components/sun/sun.css';
import '@/components/season/season.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { Slot } from 'expo-router';
import { Suspense, useState, type ReactElement } from 'react';
import { createQueryClient } from '@/components/data/queryClient';
import { RootErrorBoundary } from '@/components/shell/RootErrorBoundary';
import { ThemeProvider } from '@/components/theme/ThemeProvider';
import { ConfirmHost } from '@/components/ui/confirm';
import { ToastHost } from '@/components/ui/Toast';

/** Around every page. `Slot` and no stack: a page that is left is gone, so nothing hidden can take the focus. */
export default function RootLayout(): ReactElement {
  const [queryClient] = useState(createQueryClient);
  return (
    <ThemeProvider>
      <QueryClientProvider client={queryClient}>
        <RootErrorBoundary>
          <Suspense fallback={null}>
            <Slot />
          </Suspense>
        </RootErrorBoundary>
        <ConfirmHost />
        <ToastHost />
      </QueryClientProvider>
    </ThemeProvider>
  );
}
