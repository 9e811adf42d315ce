'use client';

import { type CSSProperties, type KeyboardEvent, type ReactNode, useEffect, useId, useLayoutEffect, useRef, useState } from 'react';
import { createPortal } from 'react-dom';
import { buttonClass } from './button';

const FOCUSABLE = 'a[href], input:not(:disabled), select:not(:disabled), textarea:not(:disabled), button:not(:disabled)';
const MARGIN = 12;
const WORD = 'border-b-2 border-current px-px text-left font-sans text-[0.86em] font-[560] leading-[1.15] hover:bg-wash aria-expanded:bg-wash';

/** Puts a panel under its word, its left or right edge at the word's, kept inside the page. */
function place(panel: HTMLElement, word: HTMLElement, edge: 'left' | 'right'): void {
  const under = word.getBoundingClientRect();
  const farthest = document.documentElement.clientWidth - panel.offsetWidth - MARGIN;
  const left = edge === 'left' ? under.left : under.right - panel.offsetWidth;
  panel.style.left = `${Math.max(MARGIN, Math.min(left, farthest)) + window.scrollX}px`;
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
  look = 'word',
  children,
}: {
  text: string;
  /** what the word stands for, for a screen reader and as the heading of what opens */
  label: string;
  style?: CSSProperties;
  className?: string;
  /** a word of a sentence, or a button that stands alone, whose text says what it is; a button's panel is the wider */
  look?: 'word' | 'button';
  /** what opens; `close` closes it and gives the focus back */
  children: (close: () => void) => ReactNode;
}) {
  const [open, setOpen] = useState(false);
  const id = useId();
  const button = useRef<HTMLButtonElement>(null);
  const panel = useRef<HTMLDivElement>(null);

  const close = () => setOpen(false);
  const edge = look === 'word' ? 'left' : 'right';

  // After every drawing: a change of the sentence may have moved the word.
  useLayoutEffect(() => {
    if (open && panel.current && button.current) place(panel.current, button.current, edge);
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
    const moved = () => own && word && place(own, word, edge);
    document.addEventListener('pointerdown', outside);
    window.addEventListener('resize', moved);
    return () => {
      document.removeEventListener('pointerdown', outside);
      window.removeEventListener('resize', moved);
      // What had the focus is gone with the panel: the word takes it back.
      if (document.activeElement === document.body || own?.contains(document.activeElement)) word?.focus({ preventScroll: true });
    };
  }, [open, edge]);

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>) => {
    if (event.key === 'Escape') {
      event.stopPropagation();
      close();
    } else if (event.key === 'Tab') {
      // The panel stands at the end of the page: Tab goes round inside it, Escape leads out.
      const stops = [...event.currentTarget.querySelectorAll<HTMLElement>(FOCUSABLE)];
      const last = event.shiftKey ? stops[0] : stops.at(-1);
      const isEdge = document.activeElement === last || (last instanceof HTMLInputElement && last.type === 'radio' && last.name === (document.activeElement as HTMLInputElement | null)?.name);
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
        aria-label={look === 'word' ? `${label}: ${text}` : undefined}
        style={style}
        className={`${look === 'word' ? WORD : `${buttonClass()} aria-expanded:bg-wash`} ${className}`}
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
            className={`absolute z-50 max-h-[70vh] overflow-y-auto border border-ink bg-paper font-sans text-[15px] leading-normal text-ink ${
              look === 'word' ? 'w-max max-w-[min(24rem,calc(100vw-24px))] p-4' : 'w-[min(36rem,calc(100vw-24px))] px-5 py-4'
            }`}
          >
            {look === 'word' && (
              <p aria-hidden className="mb-2.5 text-[13px] text-soft">
                {label}
              </p>
            )}
            {children(close)}
          </div>,
          document.body,
        )}
    </>
  );
}
