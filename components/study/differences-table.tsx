import type { Study } from '@/engine';
import { differencesOf } from '@/lib/client/study-differences';
import { useValueNames } from './context';

/** What differs between the study here and another version of it, in words. */
export function DifferencesTable({ mine, theirs, heading }: { mine: Study; theirs: Study; heading: string }) {
  const differences = differencesOf(mine, theirs, useValueNames());
  if (differences.length === 0) return <p className="mt-3">Nothing differs.</p>;
  return (
    <div className="mt-3 overflow-x-auto" role="region" aria-label="What differs" tabIndex={0}>
      <table className="w-full min-w-[560px] text-left align-top">
        <thead>
          <tr className="text-[13px] text-soft">
            <th scope="col" className="pb-1 font-normal">What differs</th>
            <th scope="col" className="pb-1 font-normal">Here</th>
            <th scope="col" className="pb-1 font-normal">{heading}</th>
          </tr>
        </thead>
        <tbody>
          {differences.map(({ what, mine: own, theirs: other }) => (
            <tr key={what} className="border-t border-hair align-top">
              <th scope="row" className="py-1.5 pr-4 font-semibold">
                {what}
              </th>
              <td className="max-w-[44ch] py-1.5 pr-4 [overflow-wrap:anywhere]">{own}</td>
              <td className="max-w-[44ch] py-1.5 [overflow-wrap:anywhere]">{other}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
