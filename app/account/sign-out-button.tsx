'use client';

import { LogOut } from 'lucide-react';
import { leave } from '@/app/_frame/leave';
import { Button } from '@/components/button';

export function SignOutButton() {
  return (
    <Button icon={<LogOut size={16} strokeWidth={1.75} aria-hidden="true" />} onClick={() => void leave()}>
      Sign out
    </Button>
  );
}
