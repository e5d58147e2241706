import { Dialog } from '#src/components/dialog.tsx';
import { Kbd } from '#src/components/kbd.tsx';
import { setShortcuts, useShortcutsOn } from '#src/lib/shortcuts.ts';

const LIST: ReadonlyArray<{ keys: readonly string[]; does: string }> = [
  { keys: ['n'], does: 'Begin a new case' },
  { keys: ['/'], does: 'Search cases, nuclides, forms and materials' },
  { keys: ['?'], does: 'Show these keys' },
  { keys: ['Ctrl', 'S'], does: 'Save the open case as a new version' },
  { keys: ['Ctrl', 'Z'], does: 'Undo a change of the open case' },
  { keys: ['Ctrl', 'Shift', 'Z'], does: 'Redo it' },
];

export function ShortcutsDialog({
  open,
  onOpenChange,
  research,
}: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  /** Whether the person works on cases at all. */
  research: boolean;
}) {
  const on = useShortcutsOn();
  const shown = research ? LIST : LIST.filter(({ keys }) => ['/', '?'].includes(keys[0] ?? ''));
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title="Keys">
      <dl className="flex flex-col gap-2">
        {shown.map(({ keys, does }) => (
          <div key={does} className="flex items-center justify-between gap-4">
            <dt>{does}</dt>
            <dd className="flex gap-1">
              {keys.map((key) => (
                <Kbd key={key}>{key}</Kbd>
              ))}
            </dd>
          </div>
        ))}
      </dl>
      <label className="flex items-center gap-2 border-t border-line pt-4 text-sm">
        <input
          type="checkbox"
          checked={on}
          onChange={(event) => setShortcuts(event.target.checked)}
          className="size-4 accent-barn"
        />
        Use single keys (switch off if they get in the way of dictation)
      </label>
    </Dialog>
  );
}
