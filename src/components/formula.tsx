import { useEffect, useRef, useState } from 'react';
import { classNames } from '#src/lib/class-names.ts';

interface FormulaProps {
  tex: string;
  /** Set on a line of its own. */
  display?: boolean;
  className?: string | undefined;
}

async function typeset(element: HTMLElement, tex: string, display: boolean): Promise<void> {
  const [katex] = await Promise.all([import('katex'), import('katex/dist/katex.min.css')]);
  // Rendered into the element: the content policy forbids the inline styles of a ready-made string.
  katex.default.render(tex, element, {
    displayMode: display,
    throwOnError: false,
    output: 'htmlAndMathml',
    strict: 'ignore',
  });
}

/** A typeset formula. Until the typesetter is here, and where it cannot be loaded, the TeX itself stands in its place. */
export function Formula({ tex, display = false, className }: FormulaProps) {
  const host = useRef<HTMLSpanElement>(null);
  const [failed, setFailed] = useState(false);

  useEffect(() => {
    let current = true;
    const element = host.current;
    if (!element) return;
    // A replacement is prepared aside, so that the line never empties while it is exchanged.
    const fresh = document.createElement('span');
    typeset(fresh, tex, display)
      .then(() => {
        if (current) element.replaceChildren(...fresh.childNodes);
      })
      .catch((cause: unknown) => {
        console.info('The formula could not be typeset', cause);
        if (current) setFailed(true);
      });
    return () => {
      current = false;
    };
  }, [tex, display]);

  return (
    <span
      className={classNames(
        display
          ? 'block overflow-x-auto overflow-y-hidden py-1 [&_.katex]:text-left! [&_.katex-display]:my-0!'
          : 'inline-block',
        className,
      )}
      // A formula wider than a telephone scrolls by itself; the keyboard must reach it too.
      {...(display ? { tabIndex: 0, role: 'group', 'aria-label': 'formula' } : {})}
    >
      <span ref={host} />
      {failed && <code className="text-sm">{tex}</code>}
    </span>
  );
}
