'use client';

import { useMutation } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { ApiError, sendJson } from '@/lib/client/get-json';
import { Button } from '../ui/button';

/** A question of the open API with an example that runs, and can be changed first. */
export function TryIt({ path, summary, example }: { path: string; summary: string; example: string }) {
  const id = useId();
  const [text, setText] = useState(example);
  const { mutate, data, error, isPending } = useMutation({
    mutationFn: (body: string) => sendJson(path, { method: 'POST', body: JSON.parse(body) as unknown }),
  });
  const problem = error instanceof ApiError ? error.message : error instanceof SyntaxError ? 'This is no JSON.' : error?.message;
  return (
    <section aria-labelledby={`${id}-heading`} className="grid gap-x-10 gap-y-4 border-t border-ink py-6 lg:grid-cols-2">
      <div className="min-w-0">
        <h2 id={`${id}-heading`} className="font-mono text-[15px] font-semibold [overflow-wrap:anywhere]">{`POST ${path}`}</h2>
        <p className="mt-1 text-soft">{summary}</p>
        <label htmlFor={id} className="mt-3 block text-[13px] text-soft">
          Body
        </label>
        <textarea
          id={id}
          value={text}
          rows={text.split('\n').length + 1}
          spellCheck={false}
          onChange={(event) => setText(event.target.value)}
          className="mt-1 block w-full rounded border border-hair bg-paper px-3 py-2 font-mono text-[13px] leading-relaxed"
        />
        <Button className="mt-3" disabled={isPending} onClick={() => mutate(text)}>
          Ask
        </Button>
      </div>
      <div className="min-w-0" role="status">
        {problem && <p className="text-mark">{problem}</p>}
        {!problem && data !== undefined && (
          <pre tabIndex={0} aria-label="Answer" className="max-h-[420px] overflow-auto border-l border-hair pl-4 font-mono text-[13px] leading-relaxed">
            {JSON.stringify(data, null, 2)}
          </pre>
        )}
      </div>
    </section>
  );
}
