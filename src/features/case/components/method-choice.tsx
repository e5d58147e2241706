import { METHODS } from '#shared/contracts/estimates.ts';
import type { Estimate, Method } from '#shared/contracts/estimates.ts';
import { useEditing } from '../editing/editor-context.ts';
import { METHOD_NAMES } from '../model/words.ts';

function isRefused({ methods }: Estimate, method: Method): boolean {
  const result = methods[method];
  return result !== undefined && 'unavailable' in result;
}

/** Which methods the case asks for: part of its document, so that what is saved and reviewed is what is seen. */
export function MethodChoice({ estimate }: { estimate: Estimate }) {
  const { draft, editDocument, readOnly } = useEditing();
  const chosen = draft.document.methods;
  if (readOnly) return null;
  const change = (method: Method, wanted: boolean) =>
    editDocument('/methods', (before) => ({
      ...before,
      methods: METHODS.filter((one) => (one === method ? wanted : before.methods.includes(one))),
    }));
  return (
    <fieldset
      className="mb-3 flex flex-wrap items-center gap-x-4 gap-y-1 border-b border-line pb-3"
      data-screen-only
    >
      <legend className="float-left mr-4 text-sm text-muted">Methods</legend>
      {METHODS.map((method) => {
        const on = chosen.includes(method);
        return (
          <label key={method} className="flex min-h-6 items-center gap-1.5 text-sm">
            <input
              type="checkbox"
              className="size-4 accent-barn"
              checked={on}
              // A case without any method has no result.
              disabled={on && chosen.length === 1}
              onChange={(event) => change(method, event.target.checked)}
            />
            {METHOD_NAMES[method]}
            {on && isRefused(estimate, method) && (
              <span className="text-muted">· not available here</span>
            )}
          </label>
        );
      })}
    </fieldset>
  );
}
