import { Field, TextInput } from './field.tsx';

/** Tags as they are typed, separated by commas. */
export function tagsOf(text: string): string[] {
  const tags = text
    .split(',')
    .map((tag) => tag.trim())
    .filter((tag) => tag !== '');
  return [...new Set(tags)];
}

export function tagsProblem(tags: readonly string[]): string | undefined {
  if (tags.length > 20) return 'There may be at most 20 tags.';
  const long = tags.find((tag) => tag.length > 40);
  return long === undefined ? undefined : `\`${long.slice(0, 20)}…\` has more than 40 characters.`;
}

export function TagsField({ text, onText }: { text: string; onText: (text: string) => void }) {
  return (
    <Field
      label="Tags"
      hint="Separated by commas, such as carbon, survey."
      error={tagsProblem(tagsOf(text))}
    >
      {(control) => (
        <TextInput
          {...control}
          autoComplete="off"
          value={text}
          onChange={(event) => onText(event.target.value)}
        />
      )}
    </Field>
  );
}
