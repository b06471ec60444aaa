import { useQueryClient } from '@tanstack/react-query';
import type {
  ChangePasswordRequest, ForgotPasswordRequest, MeResponse, ResetPasswordRequest, SessionListResponse, SignedInResponse, SignInRequest, SignUpRequest,
} from '@/shared/contracts/accounts';
import { send } from './apiClient';
import { keys } from './keys';
import { meChanged, sessionBegan, sessionEnded } from './session';
import { useRead, useWrite } from './useApi';

interface Done { done: true }

export function useSignUp() {
  return useWrite<Done, SignUpRequest>((body) => ({ method: 'POST', path: '/auth/sign-up', body }));
}

export function useSignIn() {
  return useWrite<SignedInResponse, SignInRequest>((body) => ({ method: 'POST', path: '/auth/sign-in', body }), { onDone: sessionBegan });
}

export function useConfirmEmail() {
  return useWrite<SignedInResponse, { token: string }>((body) => ({ method: 'POST', path: '/auth/confirm', body }), { onDone: sessionBegan });
}

export function useResendConfirmation() {
  return useWrite<Done, ForgotPasswordRequest>((body) => ({ method: 'POST', path: '/auth/resend-confirmation', body }));
}

export function useForgotPassword() {
  return useWrite<Done, ForgotPasswordRequest>((body) => ({ method: 'POST', path: '/auth/forgot', body }));
}

export function useResetPassword() {
  return useWrite<Done, ResetPasswordRequest>((body) => ({ method: 'POST', path: '/auth/reset', body }));
}

export function useChangePassword() {
  return useWrite<Done, ChangePasswordRequest>((body) => ({ method: 'POST', path: '/me/password', body }), { stale: [keys.sessions] });
}

export function useUpdateMe() {
  return useWrite<MeResponse, { name: string }>((body) => ({ method: 'PATCH', path: '/me', body }), { onDone: meChanged });
}

export function useSessions() {
  return useRead<SessionListResponse>(keys.sessions, '/me/sessions');
}

export function useEndSession() {
  return useWrite<Done, { sessionId: string }>(({ sessionId }) => ({ method: 'DELETE', path: `/me/sessions/${sessionId}` }), { stale: [keys.sessions] });
}

export function useEndOtherSessions() {
  return useWrite<Done, void>(() => ({ method: 'DELETE', path: '/me/sessions' }), { stale: [keys.sessions] });
}

/** Ends the session here and on the server, and forgets everything that was read with it. */
export function useSignOut(): () => Promise<void> {
  const client = useQueryClient();
  return async () => {
    try {
      await send('POST', '/auth/sign-out');
    } finally {
      sessionEnded();
      client.clear();
    }
  };
}

/** Deletes the account; on success nothing of it is left on this device either. */
export function useDeleteAccount() {
  const client = useQueryClient();
  return useWrite<Done, { password: string }>((body) => ({ method: 'DELETE', path: '/me', body }), {
    onDone: () => {
      sessionEnded();
      client.clear();
    },
  });
}
