/** Names that a condition asks about. */
import type { Condition } from '@oilway/circuit';

export function conditionNames(condition: Condition): string[] {
  switch (condition.op) {
    case 'and':
    case 'or':
      return condition.items.flatMap(conditionNames);
    case 'unknown':
      return [];
    default:
      return [condition.of];
  }
}
