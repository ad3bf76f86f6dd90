/** Checks a certificate; null when all holds, else what does not. */
export function refusal(certificate: unknown): string | null;
