import type { Session, User } from '@/server/models';
import type { MeResponse, SessionListResponse, SignedInResponse } from '@/shared/contracts/accounts';

/** A person as they see themself. */
export function presentMe(user: User): MeResponse {
  return { id: user.id, name: user.name, email: user.email, emailConfirmed: user.emailConfirmedAt !== null, createdAt: user.createdAt.toISOString() };
}

/** What a beginning or renewed session answers; the refresh token is not in it. */
export function presentSignedIn(user: User, access: { token: string; expiresAt: Date }): SignedInResponse {
  return { accessToken: access.token, expiresAt: access.expiresAt.toISOString(), me: presentMe(user) };
}

/** A person's sessions, marking the one that asks. */
export function presentSessions(sessions: Session[], currentId: string): SessionListResponse {
  return {
    sessions: sessions.map((session) => ({
      id: session.id, device: session.device, createdAt: session.createdAt.toISOString(), lastUsedAt: session.lastUsedAt.toISOString(),
      expiresAt: session.expiresAt.toISOString(), isThisOne: session.id === currentId,
    })),
  };
}
