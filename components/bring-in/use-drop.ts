'use client';

import { useEffect, useEffectEvent, useState } from 'react';

const isField = (target: EventTarget | null): boolean => target instanceof HTMLElement && target.closest('input, textarea, select, [contenteditable]') !== null;
const holdsFile = (event: DragEvent): boolean => event.dataTransfer?.types.includes('Files') ?? false;

/**
 * A file dropped anywhere on the page, or pasted outside of a field.
 * @returns whether a file is held over the page
 */
export function useDrop(onFile: (file: File) => void): boolean {
  const [isOver, setOver] = useState(false);
  const take = useEffectEvent((file: File | undefined) => {
    if (file) onFile(file);
  });
  useEffect(() => {
    const over = (event: DragEvent) => {
      if (!holdsFile(event)) return;
      // Without it the browser would leave the page and show the file.
      event.preventDefault();
      setOver(true);
    };
    const out = (event: DragEvent) => {
      if (event.relatedTarget === null) setOver(false);
    };
    const drop = (event: DragEvent) => {
      setOver(false);
      if (!holdsFile(event)) return;
      event.preventDefault();
      take(event.dataTransfer?.files[0]);
    };
    const paste = (event: ClipboardEvent) => {
      const file = event.clipboardData?.files[0];
      if (file) {
        event.preventDefault();
        take(file);
        return;
      }
      const text = event.clipboardData?.getData('text') ?? '';
      if (!isField(event.target) && /^\s*[<{]/.test(text)) take(new File([text], 'Pasted text'));
    };
    window.addEventListener('dragover', over);
    window.addEventListener('dragleave', out);
    window.addEventListener('drop', drop);
    window.addEventListener('paste', paste);
    return () => {
      window.removeEventListener('dragover', over);
      window.removeEventListener('dragleave', out);
      window.removeEventListener('drop', drop);
      window.removeEventListener('paste', paste);
    };
  }, []);
  return isOver;
}
