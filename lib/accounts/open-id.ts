import type { Knex } from 'knex';
import type { Profile } from 'next-auth';
import type { OAuthConfig } from 'next-auth/providers/oauth';
import { inTransaction, isDuplicate } from '@/db/client';
import { findIdentity, insertIdentity } from '@/db/queries/identities';
import { deleteSignUps } from '@/db/queries/sign-ups';
import { findUserByEmail } from '@/db/queries/users';
import { Failure } from '@/lib/access';
import { env } from '@/lib/env';
import { queueLetter } from '@/lib/mail';
import { EmailAddress, oneLine } from './fields';
import { linkedLetter } from './letters';
import { makeAccount } from './sign-up';

/** The id of the provider in next-auth's addresses: /api/auth/callback/oidc. */
export const OPEN_ID = 'oidc';

/** What is read of the claims of OpenID Connect Core 1.0, section 5.1; a provider may send anything. */
export interface Claims {
  iss?: unknown;
  sub?: unknown;
  email?: unknown;
  email_verified?: unknown;
  name?: unknown;
}

export interface OpenIdSettings {
  issuer: string;
  clientId: string;
  clientSecret: string;
  /** What people call the service. */
  name: string;
}

/** The service that people may sign in through; null where none is configured. */
export function openIdSettings(): OpenIdSettings | null {
  const { OIDC_ISSUER, OIDC_CLIENT_ID, OIDC_CLIENT_SECRET, OIDC_NAME } = env();
  if (OIDC_ISSUER === undefined || OIDC_CLIENT_ID === undefined) return null;
  return {
    issuer: OIDC_ISSUER,
    clientId: OIDC_CLIENT_ID,
    clientSecret: OIDC_CLIENT_SECRET ?? '',
    name: OIDC_NAME ?? new URL(OIDC_ISSUER).hostname,
  };
}

/**
 * The provider as next-auth takes it: authorization code with PKCE, state and nonce. Claims of the
 * ID token are completed by those of the userinfo endpoint, where providers put the address; that
 * both speak of one subject is checked on the way.
 */
export function openIdProvider(settings: OpenIdSettings): OAuthConfig<Claims> {
  const { issuer, clientId, clientSecret, name } = settings;
  return {
    id: OPEN_ID,
    name,
    type: 'oauth',
    wellKnown: `${issuer.replace(/\/$/, '')}/.well-known/openid-configuration`,
    clientId,
    clientSecret,
    authorization: { params: { scope: 'openid email profile' } },
    idToken: true,
    checks: ['pkce', 'state', 'nonce'],
    userinfo: {
      async request({ tokens, client }) {
        const claims = readPayload(tokens.id_token ?? '');
        const more: Claims =
          client.issuer.metadata.userinfo_endpoint === undefined
            ? {}
            : await client.userinfo(tokens.access_token ?? '', {});
        if (more.sub !== undefined && more.sub !== claims.sub) {
          throw new Error('The ID token and the userinfo endpoint speak of two subjects.');
        }
        return { ...more, ...claims } as Profile;
      },
    },
    profile(claims) {
      return { id: typeof claims.sub === 'string' ? claims.sub : '' };
    },
  };
}

/** The payload of an ID token whose signature, nonce and audience were checked already. */
function readPayload(token: string): Claims {
  const payload = Buffer.from(token.split('.')[1] ?? '', 'base64url').toString('utf8');
  return JSON.parse(payload) as Claims;
}

const ASCII = /^[\x21-\x7e]{1,255}$/;

/**
 * The person whom the claims mean: known by issuer and subject, else by the verified address, which
 * links the account for good and is told by letter; else somebody new with a workshop of their own.
 * @returns the person's id
 * @throws Failure `forbidden` when the provider does not vouch for the address
 */
export async function personOfClaims(claims: Claims, settings: OpenIdSettings): Promise<string> {
  const { iss, sub } = claims;
  const email = EmailAddress.safeParse(claims.email);
  const issuer = settings.issuer.replace(/\/$/, '');
  if (typeof iss !== 'string' || iss.replace(/\/$/, '') !== issuer) {
    throw new Failure('forbidden', 'The service that answered is not the one that was asked.');
  }
  if (typeof sub !== 'string' || !ASCII.test(sub)) {
    throw new Failure('forbidden', 'The service did not say who is signing in.');
  }
  if (claims.email_verified !== true || !email.success) {
    throw new Failure('forbidden', 'The service does not vouch for an e-mail address.');
  }
  const work = (trx: Knex.Transaction) =>
    findOrMake(trx, { issuer, subject: sub, email: email.data, name: nameOf(claims) }, settings);
  try {
    return await inTransaction(work);
  } catch (error) {
    // Made at the same moment by another request: now it is found.
    if (isDuplicate(error)) return inTransaction(work);
    throw error;
  }
}

interface Known {
  issuer: string;
  subject: string;
  email: string;
  name: string | null;
}

async function findOrMake(
  trx: Knex.Transaction,
  { issuer, subject, email, name }: Known,
  settings: OpenIdSettings,
): Promise<string> {
  const linked = await findIdentity(trx, issuer, subject);
  if (linked !== null) return linked;
  // Every account's address is confirmed: none is made before.
  const known = await findUserByEmail(trx, email);
  const called = name ?? email.slice(0, email.indexOf('@'));
  const userId =
    known?.id ??
    (await makeAccount(trx, {
      name: called,
      email,
      passwordHash: null,
      workshop: `Workshop of ${called}`.slice(0, 120),
    }));
  await deleteSignUps(trx, email);
  await insertIdentity(trx, { issuer, subject, userId });
  if (known !== null) await queueLetter(trx, linkedLetter(known, settings.name));
  return userId;
}

function nameOf({ name }: Claims): string | null {
  const read = oneLine('The name', 120).safeParse(name);
  return read.success ? read.data : null;
}
