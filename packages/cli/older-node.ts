/** What Node 20 lacks of the language and the parser needs: loaded before everything else. */

type GroupBy = <T>(items: Iterable<T>, keyOf: (item: T, index: number) => PropertyKey) => Partial<Record<PropertyKey, T[]>>;
const object = Object as unknown as { groupBy?: GroupBy };

object.groupBy ??= <T>(items: Iterable<T>, keyOf: (item: T, index: number) => PropertyKey) => {
  const groups: Partial<Record<PropertyKey, T[]>> = Object.create(null);
  let index = 0;
  for (const item of items) {
    const key = keyOf(item, index++);
    const group = groups[key];
    if (group === undefined) groups[key] = [item];
    else group.push(item);
  }
  return groups;
};
