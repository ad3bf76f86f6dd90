import type { KeyScope } from '@/lib/access';

/** A signed-in person, as services take them. */
export interface Person {
  id: string;
  name: string;
  email: string;
}

/** One session of a person, as their settings list it. */
export interface SessionLine {
  id: string;
  /** Browser and system in words. */
  device: string;
  begunAt: string;
  /** Roughly: to a few minutes. */
  seenAt: string;
  /** The one that asks. */
  current: boolean;
}

export interface MemberWorkshop {
  id: string;
  name: string;
  admin: boolean;
}

/** A key as listed: never the key itself, only the visible fragment that tells it from others. */
export interface ApiKeyLine {
  id: string;
  label: string;
  fragment: string;
  scopes: KeyScope[];
  madeAt: string;
  expiresAt: string | null;
  lastUsedAt: string | null;
  revokedAt: string | null;
}

/** A key as shown once, at its making. */
export interface NewApiKey extends ApiKeyLine {
  key: string;
}
