import { Copy, Download } from 'lucide-react';
import { Button } from '#src/components/button.tsx';
import { downloadCsv } from '#src/components/plot-export.ts';
import { csvOf } from '#src/lib/csv.ts';
import { say } from '#src/lib/toasts.ts';

interface TakeRowsProps {
  fileName: string;
  /** Names, units, then one row a line, as texts with all digits. */
  rows: () => string[][];
}

/** The numbers of a table for a spreadsheet: copied as columns, or as a file. */
export function TakeRows({ fileName, rows }: TakeRowsProps) {
  async function copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(
        rows()
          .map((row) => row.join('\t'))
          .join('\n'),
      );
      say('The table is copied, with all digits and units.', {
        tone: 'sound',
      });
    } catch (refused) {
      console.info('The browser keeps the clipboard closed', refused);
      say('The browser does not let this page copy; take the CSV file instead.', { tone: 'fault' });
    }
  }
  return (
    <div className="flex flex-wrap gap-2">
      <Button size="small" onClick={() => void copy()}>
        <Copy aria-hidden="true" className="size-4" /> Copy the table
      </Button>
      <Button size="small" onClick={() => downloadCsv(fileName, csvOf(rows()))}>
        <Download aria-hidden="true" className="size-4" /> CSV
      </Button>
    </div>
  );
}
