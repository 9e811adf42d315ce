import type { Fraction } from '../../exact/fraction';
import type { MetreChange } from '../../views/measures';
import { writtenPlan } from '../../views/written-line';

/**
 * From what sounds to what is written: a stretch that is written as another tempo has other lengths on paper.
 * @returns a position in whole notes that sound as one in whole notes as written, both from the start
 */
export function writtenTime(plan: readonly MetreChange[]): (position: Fraction) => Fraction {
  const written = writtenPlan(plan);
  return (position) => {
    let low = 0;
    let high = plan.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (plan[middle]!.at.compare(position) <= 0) low = middle;
      else high = middle - 1;
    }
    return written[low]!.at.add(position.sub(plan[low]!.at).div(plan[low]!.scale));
  };
}
