import { Failure } from '@/lib/access';
import { passCookies, readForm, route } from '@/lib/http';
import { PassphraseForm, tryPassphrase } from '@/lib/notebooks';

/** The form of a link's page, which needs no script: it leads back to the page, opened or not. */
export const POST = route({ person: 'none' }, async ({ request, address, part }) => {
  const token = part('token');
  const { passphrase } = PassphraseForm.catch({ passphrase: '' }).parse(await readForm(request));
  const back = (query: string, cookies: string[] = []) => {
    const headers = new Headers({ location: `/client/${encodeURIComponent(token)}${query}` });
    for (const cookie of cookies) headers.append('set-cookie', cookie);
    return new Response(null, { status: 303, headers });
  };
  try {
    const pass = await tryPassphrase(token, passphrase, address);
    return pass === null ? back('?passphrase=wrong') : back('', passCookies(token, pass));
  } catch (fault) {
    if (!(fault instanceof Failure)) throw fault;
    return back(fault.code === 'too-many' ? '?passphrase=wait' : '');
  }
});
