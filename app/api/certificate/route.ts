import { LIMITS, countAgainst } from '@/lib/accounts';
import { CertificateRequest } from '@/lib/evaluation';
import { NOTEBOOK_BODY, route } from '@/lib/http';
import { certificateFor } from '@/lib/notebooks';

export const POST = route(
  { person: 'required', key: 'evaluate', body: CertificateRequest, bodyLimit: NOTEBOOK_BODY },
  async ({ person, keyId, body }) => {
    if (keyId === null) await countAgainst(LIMITS.evaluatePerson, person.id);
    else await countAgainst(LIMITS.evaluateKey, keyId);
    return certificateFor(body);
  },
);
