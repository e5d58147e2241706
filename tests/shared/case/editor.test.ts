import { describe, expect, test } from 'vitest';
import { DEFAULT_DOCUMENT } from '#src/features/case/model/default-document.ts';
import {
  PAUSE_MS,
  STEPS_KEPT,
  editorReducer,
  startEditing,
} from '#src/features/case/model/editor.ts';
import type { Draft, EditorState } from '#src/features/case/model/editor.ts';

const start: Draft = { title: 'A', tags: [], document: DEFAULT_DOCUMENT, open: {} };

function retitle(state: EditorState, title: string, at: number, field = 'title'): EditorState {
  return editorReducer(state, {
    type: 'edit',
    field,
    at,
    change: (draft) => ({ ...draft, title }),
  });
}

describe('steps back and forth', () => {
  test('keystrokes of one field within the pause are one step', () => {
    let state = startEditing(start);
    state = retitle(state, 'AB', 1000);
    state = retitle(state, 'ABC', 1000 + PAUSE_MS);
    expect(state.past).toHaveLength(1);
    expect(editorReducer(state, { type: 'undo' }).present.title).toBe('A');
  });

  test('a pause, or another field, begins a new step', () => {
    let state = startEditing(start);
    state = retitle(state, 'AB', 1000);
    state = retitle(state, 'ABC', 1001 + PAUSE_MS);
    state = retitle(state, 'ABCD', 1002 + PAUSE_MS, 'other');
    expect(state.past.map(({ title }) => title)).toEqual(['A', 'AB', 'ABC']);
  });

  test('undo then redo returns to the same draft, and an edit after undo forgets the future', () => {
    let state = startEditing(start);
    state = retitle(state, 'B', 0);
    state = retitle(state, 'C', 10_000);
    const undone = editorReducer(editorReducer(state, { type: 'undo' }), { type: 'undo' });
    expect(undone.present).toBe(start);
    const redone = editorReducer(editorReducer(undone, { type: 'redo' }), { type: 'redo' });
    expect(redone.present).toBe(state.present);
    expect(retitle(undone, 'D', 20_000).future).toEqual([]);
  });

  test('after undo the next keystroke is a step of its own', () => {
    let state = startEditing(start);
    state = retitle(state, 'B', 0);
    state = editorReducer(state, { type: 'undo' });
    state = retitle(state, 'C', 10);
    expect(editorReducer(state, { type: 'undo' }).present.title).toBe('A');
  });

  test('undo and redo at the ends, and an edit that changes nothing, leave the state itself', () => {
    const state = startEditing(start);
    expect(editorReducer(state, { type: 'undo' })).toBe(state);
    expect(editorReducer(state, { type: 'redo' })).toBe(state);
    const still = editorReducer(state, { type: 'edit', field: 'x', at: 0, change: (d) => d });
    expect(still).toBe(state);
  });

  test('the number of steps kept is bounded', () => {
    let state = startEditing(start);
    for (let i = 0; i <= STEPS_KEPT + 5; i += 1) state = retitle(state, String(i), i, `field ${i}`);
    expect(state.past).toHaveLength(STEPS_KEPT);
  });
});
