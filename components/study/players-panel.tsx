'use client';

import { type FormEvent, useState } from 'react';
import { listWords } from '@/engine';
import { addPlayer, movePlayer, playersForAll, removePlayer, renamePlayer, setPlays } from '@/lib/client/print-edits';
import { Button, TextButton } from '../ui/button';
import { Token } from '../ui/token';
import { TryField } from '../ui/try-field';
import { attempt, useStudy } from './context';

/** Who plays what: each player has a part. */
export function PlayersPanel() {
  const { editor, state } = useStudy();
  const { players, instruments } = state.study;
  const [name, setName] = useState('');
  const [error, setError] = useState<string | null>(null);
  const nameOf = (id: string): string => instruments.find((one) => one.id === id)?.name ?? id;
  const change = (...edit: Parameters<typeof attempt>) => setError(attempt(...edit));
  const idle = instruments.filter(({ id }) => !players.some((player) => player.instruments.includes(id)));
  const shared = instruments.filter(({ id }) => players.filter((player) => player.instruments.includes(id)).length > 1);
  const add = (event: FormEvent) => {
    event.preventDefault();
    const answer = attempt(editor, () => addPlayer(name));
    setError(answer);
    if (answer === null) setName('');
  };
  return (
    <section aria-labelledby="players-heading" className="mt-10 min-w-0">
      <h2 id="players-heading" className="mb-2 text-[15px] font-semibold">
        Players
      </h2>
      <ul role="list" className="text-[14.5px]">
        {players.map((player, index) => (
          <li key={player.id} className="flex flex-wrap items-baseline gap-x-4 gap-y-1 border-t border-hair py-2">
            <Token text={player.name} label="Name of the player" className="border-b! text-[1em]!">
              {(close) => <TryField label="Name" initial={player.name} onTry={(text) => attempt(editor, () => renamePlayer(player.id, text.trim()))} onDone={close} />}
            </Token>
            <Token text={player.instruments.length === 0 ? 'plays nothing yet' : player.instruments.map(nameOf).join(', ')} label={`What ${player.name} plays`} className="border-b! text-[1em]! font-normal!">
              {() => (
                <fieldset>
                  <legend className="sr-only">{`Instruments of ${player.name}`}</legend>
                  {instruments.map((instrument) => (
                    <label key={instrument.id} className="flex cursor-pointer items-baseline gap-2.5 py-1">
                      <input
                        type="checkbox"
                        className="accent-ink"
                        checked={player.instruments.includes(instrument.id)}
                        onChange={(event) => change(editor, () => setPlays(player.id, instrument.id, event.target.checked))}
                      />
                      {instrument.name}
                    </label>
                  ))}
                </fieldset>
              )}
            </Token>
            <span className="ml-auto flex gap-x-4 text-[14px]">
              <TextButton disabled={index === 0} aria-label={`Move ${player.name} up`} onClick={() => change(editor, () => movePlayer(player.id, -1))}>
                Up
              </TextButton>
              <TextButton disabled={index === players.length - 1} aria-label={`Move ${player.name} down`} onClick={() => change(editor, () => movePlayer(player.id, 1))}>
                Down
              </TextButton>
              <TextButton aria-label={`Remove ${player.name}`} onClick={() => change(editor, () => removePlayer(player.id))}>
                Remove
              </TextButton>
            </span>
          </li>
        ))}
      </ul>
      <p className="border-t border-hair pt-2 text-[13.5px] text-soft" data-testid="players-words">
        {players.length === 0 && 'Nobody is named yet. Each player has a part of their own. '}
        {players.length > 0 && idle.length > 0 && `${listWords(idle.map((one) => one.name))} ${idle.length === 1 ? 'is' : 'are'} played by nobody: no part has ${idle.length === 1 ? 'it' : 'them'}. `}
        {shared.length > 0 && `${listWords(shared.map((one) => one.name))} ${shared.length === 1 ? 'is' : 'are'} shared, and ${shared.length === 1 ? 'stands' : 'stand'} in each of the parts. `}
        {idle.length > 0 && (
          <TextButton className="text-ink" onClick={() => change(editor, playersForAll)}>
            {players.length === 0 ? 'Give each instrument its own player' : 'Give each of these a player'}
          </TextButton>
        )}
      </p>
      {error && (
        <p role="alert" className="mt-2 text-[14px] text-mark">
          {error}
        </p>
      )}
      <form onSubmit={add} className="mt-3 flex flex-wrap items-end gap-3">
        <label>
          <span className="mb-1 block text-[13px] text-soft">New player</span>
          <input value={name} onChange={(event) => setName(event.target.value)} className="rounded border border-hair bg-paper px-2.5 py-1.5" autoComplete="off" />
        </label>
        <Button type="submit" disabled={name.trim() === ''}>
          Add player
        </Button>
      </form>
    </section>
  );
}
