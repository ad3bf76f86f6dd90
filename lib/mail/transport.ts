import { createTransport } from 'nodemailer';
import type { Env } from '@/lib/env';
import type { Letter } from './letter';
import { writeHtml } from './write-html';
import { oneLine, writeText } from './write-text';

/** Where letters are handed in. What it throws has a `code`, and a `responseCode` from the server. */
export interface Transport {
  /** @param id the same for every attempt at one letter, so that a repeat is known as one */
  send(letter: Letter, id: string): Promise<void>;
  close(): void;
}

/** Where mail is handed in and whom it comes from, as the environment says. */
export interface TransportSettings {
  url: string;
  user: string | null;
  password: string | null;
  from: string;
}

/** A stalled server must not hold a letter longer than its lease. */
const CONNECT_MS = 15_000;
const SILENCE_MS = 30_000;

/** The settings that the environment holds; null where nothing takes mail. */
export function transportSettings(env: Env): TransportSettings | null {
  const host = new URL(env.NEXTAUTH_URL).hostname;
  // An address literal takes brackets (RFC 5321, section 4.1.3), and IPv6 a tag of its own.
  const domain = host.startsWith('[')
    ? `[IPv6:${host.slice(1)}`
    : /^[\d.]+$/.test(host)
      ? `[${host}]`
      : host;
  const from = env.MAIL_FROM ?? `Surdwork <surdwork@${domain}>`;
  if (env.SMTP_URL !== undefined) return { url: env.SMTP_URL, user: null, password: null, from };
  if (env.SMTP_HOST === undefined) return null;
  const secure = env.SMTP_SECURE === '1';
  return {
    url: `${secure ? 'smtps' : 'smtp'}://${env.SMTP_HOST}:${env.SMTP_PORT ?? (secure ? 465 : 587)}`,
    user: env.SMTP_USER ?? null,
    password: env.SMTP_PASSWORD ?? null,
    from,
  };
}

/** SMTP by nodemailer. Header fields are encoded by it; nothing here reaches them with a line break. */
export function smtpTransport(settings: TransportSettings): Transport {
  const { url, user, password, from } = settings;
  const { hostname, port, protocol, username, password: inUrl } = new URL(url);
  const secure = protocol === 'smtps:';
  const login = user ?? decodeURIComponent(username);
  const transporter = createTransport({
    host: hostname.replace(/^\[|\]$/g, ''),
    port: port === '' ? (secure ? 465 : 587) : Number(port),
    secure,
    ...(login === '' ? {} : { auth: { user: login, pass: password ?? decodeURIComponent(inUrl) } }),
    connectionTimeout: CONNECT_MS,
    greetingTimeout: CONNECT_MS,
    dnsTimeout: CONNECT_MS,
    socketTimeout: SILENCE_MS,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  const [, domain = 'localhost'] = /@([^\s>]+)>?\s*$/.exec(from) ?? [];
  return {
    async send(letter, id) {
      await transporter.sendMail({
        from,
        to: [{ name: oneLine(letter.name ?? ''), address: letter.to }],
        subject: oneLine(letter.subject),
        text: writeText(letter),
        html: writeHtml(letter),
        messageId: `<${id}@${domain}>`,
        // RFC 3834: programs that answer mail by themselves leave such letters alone.
        headers: { 'Auto-Submitted': 'auto-generated' },
      });
    },
    close() {
      transporter.close();
    },
  };
}
