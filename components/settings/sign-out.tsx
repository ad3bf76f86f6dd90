'use client';

import { signOut } from 'next-auth/react';
import { Button } from '@/components/ui/button';

/** Ends this session. */
export function SignOut() {
  return <Button onClick={() => void signOut({ callbackUrl: '/' })}>Sign out</Button>;
}
