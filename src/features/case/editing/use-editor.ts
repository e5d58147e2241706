import { useCallback, useEffect, useReducer } from 'react';
import type { CaseDocument } from '#shared/contracts/cases.ts';
import { editorReducer, startEditing } from '../model/editor.ts';
import type { Draft, EditorState } from '../model/editor.ts';

export interface Editor {
  state: EditorState;
  edit: (field: string, change: (draft: Draft) => Draft) => void;
  editDocument: (field: string, change: (document: CaseDocument) => CaseDocument) => void;
  undo: () => void;
  redo: () => void;
  load: (draft: Draft) => void;
}

export function useEditor(initial: Draft): Editor {
  const [state, dispatch] = useReducer(editorReducer, initial, startEditing);
  const edit = useCallback((field: string, change: (draft: Draft) => Draft) => {
    dispatch({ type: 'edit', field, at: Date.now(), change });
  }, []);
  const editDocument = useCallback(
    (field: string, change: (document: CaseDocument) => CaseDocument) =>
      edit(field, (draft) => {
        const document = change(draft.document);
        return document === draft.document ? draft : { ...draft, document };
      }),
    [edit],
  );
  const undo = useCallback(() => dispatch({ type: 'undo' }), []);
  const redo = useCallback(() => dispatch({ type: 'redo' }), []);
  const load = useCallback((draft: Draft) => dispatch({ type: 'load', draft }), []);
  return { state, edit, editDocument, undo, redo, load };
}

interface Shortcuts {
  undo: () => void;
  redo: () => void;
  save: () => void;
}

/** Ctrl or ⌘ with Z, Shift+Z (or Y) and S, wherever the focus is on the page; not behind an open dialog. */
export function useShortcuts({ undo, redo, save }: Shortcuts): void {
  useEffect(() => {
    function onKey(event: KeyboardEvent): void {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      const inDialog = event.target instanceof Element && event.target.closest('[role=dialog]');
      if (inDialog) return;
      const key = event.key.toLowerCase();
      const run =
        key === 's'
          ? save
          : key === 'y' || (key === 'z' && event.shiftKey)
            ? redo
            : key === 'z'
              ? undo
              : null;
      if (!run) return;
      event.preventDefault();
      run();
    }
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [undo, redo, save]);
}
