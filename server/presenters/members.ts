import type { Invitation, Membership } from '@/server/models';
import type { InvitationPreviewResponse, MemberListResponse, PreferencesResponse } from '@/shared/contracts/yards';

type InvitationResponse = MemberListResponse['invitations'][number];

export function presentInvitation(invitation: Invitation): InvitationResponse {
  return {
    id: invitation.id, email: invitation.email, role: invitation.role, createdAt: invitation.createdAt.toISOString(), expiresAt: invitation.expiresAt.toISOString(),
  };
}

export function presentInvitationPreview(invitation: Invitation, told: { yardName: string; invitedBy: string | null }): InvitationPreviewResponse {
  return { yardName: told.yardName, role: invitation.role, invitedBy: told.invitedBy, email: invitation.email, expiresAt: invitation.expiresAt.toISOString() };
}

/** Members of a yard as one of them sees them. */
export function presentMembers(
  members: { id: string; name: string; email: string; role: MemberListResponse['members'][number]['role']; since: Date }[], invitations: Invitation[], viewerId: string,
): MemberListResponse {
  return {
    members: members.map((member) => ({
      id: member.id, name: member.name, email: member.email, role: member.role, since: member.since.toISOString(), isYou: member.id === viewerId,
    })),
    invitations: invitations.map(presentInvitation),
  };
}

export function presentPreferences(member: Membership): PreferencesResponse {
  return { wantsMorningEmail: member.wantsMorningEmail, wantsMoveEmail: member.wantsMoveEmail };
}
