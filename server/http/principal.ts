import type { Role } from '#shared/members/permissions';
import type { ApiScope } from '#drizzle/tables/access';

/** A person who signed in, in the shop their session looks at. */
export interface MemberPrincipal {
  kind: 'member';
  shopId: string;
  memberId: string;
  personId: string;
  sessionId: string;
  /** SHA-256 of the session's token: what a revocation names. */
  credential: string;
  email: string;
  roles: readonly Role[];
}

/** Another system with an API key. */
export interface ClientPrincipal {
  kind: 'client';
  shopId: string;
  keyId: string;
  credential: string;
  scopes: readonly ApiScope[];
}

/** A paired display: looks and nothing else. */
export interface ScreenPrincipal {
  kind: 'screen';
  shopId: string;
  screenId: string;
  credential: string;
}

export type Principal = MemberPrincipal | ClientPrincipal | ScreenPrincipal;
