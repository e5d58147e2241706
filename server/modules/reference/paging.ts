type SortValue = string | number | null;

function compare(one: SortValue, other: SortValue): number {
  if (typeof one === 'number' && typeof other === 'number') return one - other;
  return String(one).localeCompare(String(other), 'en');
}

/** Sorted by `key` or `-key`; what has no value stands last either way. Without a sort the order stays. */
export function ordered<T>(
  items: readonly T[],
  sort: string | undefined,
  values: Readonly<Record<string, (item: T) => SortValue>>,
): readonly T[] {
  const falling = sort?.startsWith('-') ?? false;
  const value = sort === undefined ? undefined : values[falling ? sort.slice(1) : sort];
  if (!value) return items;
  return [...items].sort((a, b) => {
    const [one, other] = [value(a), value(b)];
    if (one === null || other === null) return Number(one === null) - Number(other === null);
    return falling ? compare(other, one) : compare(one, other);
  });
}

export interface Paging {
  page: number;
  pageSize: number;
}

export function pageOf<T>(items: readonly T[], { page, pageSize }: Paging) {
  const first = (page - 1) * pageSize;
  return { items: items.slice(first, first + pageSize), page, pageSize, total: items.length };
}
