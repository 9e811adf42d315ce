'use client';

import { type CSSProperties, type KeyboardEvent, type ReactNode, useEffect, useId, useLayoutEffect, useRef, useState } from 'react';
import { createPortal } from 'react-dom';

const FOCUSABLE = 'input:not(:disabled), select:not(:disabled), textarea:not(:disabled), button:not(:disabled)';
const MARGIN = 12;

/** Puts a panel under its word, kept inside the page. */
function place(panel: HTMLElement, word: HTMLElement): void {
  const under = word.getBoundingClientRect();
  const farthest = document.documentElement.clientWidth - panel.offsetWidth - MARGIN;
  panel.style.left = `${Math.max(MARGIN, Math.min(under.left, farthest)) + window.scrollX}px`;
  panel.style.top = `${under.bottom + window.scrollY + 6}px`;
}

/**
 * An underlined word of a sentence that is a control. Click, Enter or Space opens it, Escape or a click elsewhere closes
 * it, and the focus comes back to the word. What opens stands outside of the sentence, so that the sentence stays one.
 */
export function Token({
  text,
  label,
  style,
  className = '',
  children,
}: {
  text: string;
  /** what the word stands for, for a screen reader and as the heading of what opens */
  label: string;
  style?: CSSProperties;
  className?: string;
  /** what opens; `close` closes it and gives the focus back */
  children: (close: () => void) => ReactNode;
}) {
  const [open, setOpen] = useState(false);
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);
  const panel = useRef<HTMLDivElement>(null);

  const close = () => setOpen(false);

  // After every drawing: a change of the sentence may have moved the word.
  useLayoutEffect(() => {
    if (open && panel.current && button.current) place(panel.current, button.current);
  });

  useEffect(() => {
    if (!open) return;
    const own = panel.current;
    const word = button.current;
    own?.querySelector<HTMLElement>(`input:checked, ${FOCUSABLE}`)?.focus();
    const outside = (event: PointerEvent) => {
      const target = event.target as Node;
      if (!own?.contains(target) && !word?.contains(target)) setOpen(false);
    };
    const moved = () => own && word && place(own, word);
    document.addEventListener('pointerdown', outside);
    window.addEventListener('resize', moved);
    return () => {
      document.removeEventListener('pointerdown', outside);
      window.removeEventListener('resize', moved);
      // What had the focus is gone with the panel: the word takes it back.
      if (document.activeElement === document.body || own?.contains(document.activeElement)) word?.focus({ preventScroll: true });
    };
  }, [open]);

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.key === 'Escape') {
      event.stopPropagation();
      close();
    } else if (event.key === 'Tab') {
      // The panel stands at the end of the page: Tab goes round inside it, Escape leads out.
      const stops = [...event.currentTarget.querySelectorAll<HTMLElement>(FOCUSABLE)];
      const edge = event.shiftKey ? stops[0] : stops.at(-1);
      const isEdge = document.activeElement === edge || (edge instanceof HTMLInputElement && edge.type === 'radio' && edge.name === (document.activeElement as HTMLInputElement | null)?.name);
      if (!isEdge) return;
      event.preventDefault();
      (event.shiftKey ? stops.at(-1) : stops[0])?.focus();
    }
  };

  return (
    <>
      <button
        ref={button}
        type="button"
        aria-expanded={open}
        aria-haspopup="dialog"
        aria-controls={open ? id : undefined}
        aria-label={`${label}: ${text}`}
        style={style}
        className={`border-b-2 border-current px-px text-left font-sans text-[0.86em] font-[560] leading-[1.15] hover:bg-wash aria-expanded:bg-wash ${className}`}
        onClick={() => setOpen(!open)}
      >
        {text}
      </button>
      {open &&
        createPortal(
          <div
            ref={panel}
            id={id}
            role="dialog"
            aria-label={label}
            onKeyDown={onKeyDown}
            className="absolute z-50 max-h-[70vh] w-max max-w-[min(24rem,calc(100vw-24px))] overflow-y-auto border border-ink bg-paper p-4 font-sans text-[15px] leading-normal text-ink"
          >
            <p aria-hidden className="mb-2.5 text-[13px] text-soft">
              {label}
            </p>
            {children(close)}
          </div>,
          document.body,
        )}
    </>
  );
}
