import type { CaseDocument } from '#shared/contracts/cases.ts';

/** A text that is no value yet: what stands in the field, and why it will not do (null: waiting for a look-up). */
export interface OpenText {
  text: string;
  problem: string | null;
}

/** Everything a person can change on the Case page. `document` is always the last valid one; `open` holds what is not valid yet. */
export interface Draft {
  title: string;
  tags: string[];
  document: CaseDocument;
  open: Record<string, OpenText>;
}

export interface EditorState {
  past: Draft[];
  present: Draft;
  future: Draft[];
  /** The field and the moment of the last edit: keystrokes in one field become one step. */
  last: { field: string; at: number } | null;
}

export type EditorAction =
  | { type: 'edit'; field: string; at: number; change: (draft: Draft) => Draft }
  | { type: 'undo' }
  | { type: 'redo' }
  | { type: 'load'; draft: Draft };

export const STEPS_KEPT = 200;
/** A pause longer than this begins a new step, even in the same field. */
export const PAUSE_MS = 1500;

export function startEditing(draft: Draft): EditorState {
  return { past: [], present: draft, future: [], last: null };
}

function edit(
  state: EditorState,
  { field, at, change }: Extract<EditorAction, { type: 'edit' }>,
): EditorState {
  const present = change(state.present);
  if (present === state.present) return state;
  const goesOn = state.last?.field === field && at - state.last.at <= PAUSE_MS;
  const past = goesOn ? state.past : [...state.past, state.present].slice(-STEPS_KEPT);
  return { past, present, future: [], last: { field, at } };
}

export function editorReducer(state: EditorState, action: EditorAction): EditorState {
  switch (action.type) {
    case 'edit':
      return edit(state, action);
    case 'undo': {
      const previous = state.past.at(-1);
      if (!previous) return state;
      return {
        past: state.past.slice(0, -1),
        present: previous,
        future: [state.present, ...state.future],
        last: null,
      };
    }
    case 'redo': {
      const [next, ...rest] = state.future;
      if (!next) return state;
      return { past: [...state.past, state.present], present: next, future: rest, last: null };
    }
    case 'load':
      return startEditing(action.draft);
  }
}
