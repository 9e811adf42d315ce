'use client';

import { useRouter } from 'next/navigation';
import { beginStudy } from '@/lib/client/new-study';
import { DropBanner, FileChoice } from './file-choice';
import { useDrop } from './use-drop';
import { useReading } from './use-reading';

/** A study's own file, dropped or chosen, opened as a new study. */
export function OpenStudyFile({ onUnkept }: { onUnkept: () => void }) {
  const router = useRouter();
  const { reading, open } = useReading((study) => {
    const id = beginStudy(study);
    if (id === null) onUnkept();
    else router.push(`/studies/${id}`);
  });
  const isOver = useDrop(open);
  return (
    <span className="inline-flex flex-wrap items-baseline gap-x-3">
      {isOver && <DropBanner text="Let go to open the study" />}
      <FileChoice text="Open a study’s file" accept=".json,application/json" onFile={open} />
      {reading.kind === 'wrong' && (
        <span role="alert" className="order-last w-full max-w-[60ch] text-[14px] text-mark [overflow-wrap:anywhere]">
          {`${reading.name}: ${reading.message}`}
        </span>
      )}
      {reading.kind === 'found' && (
        <span role="alert" className="order-last w-full max-w-[60ch] text-[14px] text-mark [overflow-wrap:anywhere]">
          {`${reading.name} is music, not a study. Open a study, or start one, and bring it in there.`}
        </span>
      )}
    </span>
  );
}
