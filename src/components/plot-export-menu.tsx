import { Download } from 'lucide-react';
import { DropdownMenu } from 'radix-ui';
import { say } from '#src/lib/toasts.ts';
import { Button } from './button.tsx';
import { downloadCsv, downloadPng, downloadSvg } from './plot-export.ts';
import type { PlotPicture } from './plot-types.ts';

interface PlotExportMenuProps {
  /** Spoken name, where a page has more than one plot. */
  label?: string;
  fileName: string;
  picture: PlotPicture;
  csv: () => string;
}

const item =
  'flex cursor-pointer justify-between gap-6 rounded px-3 py-1.5 outline-none data-highlighted:bg-soft';

export function PlotExportMenu({ label, fileName, picture, csv }: PlotExportMenuProps) {
  const attempt = (work: Promise<void>) => {
    work.catch((cause: unknown) => {
      console.info('Export failed', cause);
      say('The picture could not be made. Try again, or take the numbers as CSV.', {
        tone: 'fault',
      });
    });
  };
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>
        <Button size="small" aria-label={label}>
          <Download aria-hidden="true" className="size-4" />
          Export
        </Button>
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={4}
          className="z-30 min-w-52 rounded border border-line bg-sheet p-1 text-ink shadow"
        >
          <DropdownMenu.Item
            className={item}
            onSelect={() => attempt(downloadPng(fileName, picture))}
          >
            Picture <span className="text-muted">PNG</span>
          </DropdownMenu.Item>
          <DropdownMenu.Item
            className={item}
            onSelect={() => attempt(downloadSvg(fileName, picture))}
          >
            Drawing <span className="text-muted">SVG</span>
          </DropdownMenu.Item>
          <DropdownMenu.Item className={item} onSelect={() => downloadCsv(fileName, csv())}>
            Numbers with units <span className="text-muted">CSV</span>
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
