import { useState, type ReactNode } from 'react';
import { Menu, X } from 'lucide-react';
import { Dialog as Radix } from 'radix-ui';
import type { Session } from '#shared/contracts/auth.ts';
import { IconButton } from '#src/components/button.tsx';
import { Brand } from './brand.tsx';
import { Rooms } from './rooms.tsx';

/** The menu of a narrow screen: the rooms and what else the top bar of a wide one holds. */
export function NarrowMenu({ session, children }: { session: Session; children: ReactNode }) {
  const [open, setOpen] = useState(false);
  const close = () => setOpen(false);
  return (
    <Radix.Root open={open} onOpenChange={setOpen}>
      <Radix.Trigger asChild>
        <IconButton label="Menu" className="lg:hidden">
          <Menu aria-hidden="true" className="size-5" />
        </IconButton>
      </Radix.Trigger>
      <Radix.Portal>
        <div data-modal className="fixed inset-0 z-40 bg-[rgb(20_14_8/0.45)]" />
        <Radix.Content
          aria-describedby={undefined}
          className="fixed inset-y-0 left-0 z-50 flex w-72 max-w-[85vw] flex-col gap-5 overflow-y-auto border-r border-line bg-paper p-4 shadow"
        >
          <div className="flex items-center justify-between">
            <Radix.Title className="sr-only">Menu</Radix.Title>
            <Brand />
            <Radix.Close asChild>
              <IconButton label="Close menu">
                <X aria-hidden="true" className="size-5" />
              </IconButton>
            </Radix.Close>
          </div>
          <Rooms session={session} onWalk={close} />
          <div className="flex flex-col items-start gap-3 border-t border-line pt-3">
            {children}
          </div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}
