import { env } from '@/lib/env';
import type { Letter } from '@/lib/mail';

/** The letters about accounts. Each tells what happened, what to do, and what if it was not you. */

const FOR_ACCOUNT = (email: string) =>
  `You get this letter because ${email} is the address of an account with Surdwork.`;

const at = (path: string) => new URL(path, env().NEXTAUTH_URL).href;

interface Addressee {
  email: string;
  name: string;
}

export function confirmationLetter(to: Addressee, workshop: string, token: string): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: 'Confirm your e-mail address',
    paragraphs: [
      `An account with Surdwork was asked for with this e-mail address, in the name of ${to.name}, with the workshop “${workshop}”.`,
      'Confirm the address and the account is made. The link is valid for 24 hours and works once.',
      'If it was not you, do nothing: without the confirmation no account is made.',
    ],
    action: { label: 'Confirm the address', url: at(`/confirm/${token}`) },
    reason: `You get this letter because somebody entered ${to.email} when making an account with Surdwork.`,
  };
}

export function alreadyKnownLetter(to: Addressee): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: 'You have an account already',
    paragraphs: [
      'Somebody, perhaps you, just wanted to make an account with this e-mail address. There is one already, so nothing was changed.',
      'Sign in with the password you have. If you have forgotten it, the page for signing in leads to a new one.',
    ],
    action: { label: 'Sign in', url: at('/sign-in') },
    reason: FOR_ACCOUNT(to.email),
  };
}

export function newPasswordLetter(to: Addressee, token: string): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: 'A new password',
    paragraphs: [
      'A new password was asked for. Choose one on the page that this link opens. It is valid for one hour and works once.',
      'If it was not you, do nothing: your password stays as it is.',
    ],
    action: { label: 'Choose a new password', url: at(`/reset/${token}`) },
    reason: FOR_ACCOUNT(to.email),
  };
}

export function passwordChangedLetter(to: Addressee): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: 'Your password was changed',
    paragraphs: [
      'The password of your account was changed just now, and all other sessions were ended.',
      'If it was not you, ask for a new password at once: only whoever reads this mailbox can.',
    ],
    action: { label: 'Ask for a new password', url: at('/forgot') },
    reason: FOR_ACCOUNT(to.email),
  };
}

export function farewellLetter(to: Addressee): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: 'Your account was deleted',
    paragraphs: [
      'Your account was deleted as you asked. Notebooks and workshops that were yours alone went with it. What you wrote in notebooks of others stays there, without your name.',
      'There is nothing left to sign in to, and no further letters will come.',
    ],
    reason: `You get this letter because ${to.email} was the address of an account with Surdwork.`,
  };
}

export function linkedLetter(to: Addressee, service: string): Letter {
  return {
    to: to.email,
    name: to.name,
    subject: `${service} now opens your account`,
    paragraphs: [
      `Somebody signed in through ${service}, which vouches that ${to.email} is theirs. From now on that opens your account, beside the password you may have.`,
      'If it was not you, look to the security of your mailbox, and write to the admin of your workshop.',
    ],
    reason: FOR_ACCOUNT(to.email),
  };
}
