/**
 * The nonce under which this document lets styles in. It is that of the document, not of the latest
 * answer: going from page to page keeps the first document and its policy. Only the property still
 * holds it; browsers hide the attribute.
 */
export function documentNonce(): string | undefined {
  return document.querySelector<HTMLScriptElement>('script[nonce]')?.nonce;
}
