/** What the tests use of the package, which brings no types. */
declare module 'oidc-provider' {
  import type { Server } from 'node:http';

  export interface Account {
    accountId: string;
    claims(): Record<string, unknown>;
  }

  export default class Provider {
    constructor(
      issuer: string,
      configuration: {
        clients: Record<string, unknown>[];
        claims: Record<string, string[]>;
        findAccount(context: unknown, id: string): Account | undefined;
        pkce: { required(): boolean };
        cookies: { keys: string[] };
      },
    );
    listen(port: number, host: string, ready: () => void): Server;
  }
}
