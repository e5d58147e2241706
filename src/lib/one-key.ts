import { useState } from 'react';

/** One Idempotency-Key a content: pressing the button twice, or again after a lost answer, is one deed. */
export function useOneKey(): (content: unknown) => string {
  const [last, setLast] = useState<{ content: string; key: string } | null>(null);
  return (content) => {
    const text = JSON.stringify(content);
    if (last?.content === text) return last.key;
    const key = crypto.randomUUID();
    setLast({ content: text, key });
    return key;
  };
}
