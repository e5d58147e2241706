import { useMemo, useRef, useState } from 'react';
import { Search as Lens } from 'lucide-react';
import { IconButton } from '#src/components/button.tsx';
import { Dialog } from '#src/components/dialog.tsx';
import { Kbd } from '#src/components/kbd.tsx';
import { useShortcuts, useShortcutsOn } from '#src/lib/shortcuts.ts';
import { SearchField } from './search-field.tsx';

/** The search of the top bar: a field on a wide screen, a button that opens one on a narrow one; the key / leads to either. */
export function HeaderSearch() {
  const field = useRef<HTMLInputElement>(null);
  const [open, setOpen] = useState(false);
  const shortcuts = useShortcutsOn();
  useShortcuts(
    useMemo(() => {
      const begin = () => {
        const wide = field.current?.checkVisibility() ?? false;
        if (wide) field.current?.select();
        else setOpen(true);
      };
      return { '/': begin };
    }, []),
  );
  return (
    <>
      <div className="flex w-full max-w-md min-w-0 max-lg:hidden">
        <SearchField
          ref={field}
          id="header-search"
          floating
          hint={shortcuts ? <Kbd>/</Kbd> : undefined}
          onDone={() => field.current?.blur()}
        />
      </div>
      <IconButton
        label="Search"
        aria-haspopup="dialog"
        className="lg:hidden"
        onClick={() => setOpen(true)}
      >
        <Lens aria-hidden="true" className="size-5" />
      </IconButton>
      <Dialog open={open} onOpenChange={setOpen} title="Search">
        <SearchField id="dialog-search" floating={false} onDone={() => setOpen(false)} />
      </Dialog>
    </>
  );
}
