'use client';

import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { signOut } from 'next-auth/react';
import { useRouter } from 'next/navigation';
import { type FormEvent, type ReactNode, useState } from 'react';
import { accountQuery, signOutEverywhereMutation, updateAccountMutation } from '@/lib/client/account-queries';
import { errorsOfAnswer } from '@/lib/client/form-errors';
import type { Account } from '@/lib/schemas/account';
import { Button } from '../ui/button';
import { Failed } from '../ui/failed';
import { Field } from '../ui/field';
import { Segments } from '../ui/segments';
import { PasswordForm } from './password-form';
import { SignOutButton } from './sign-out-button';

function Panel({ heading, children }: { heading: string; children: ReactNode }) {
  return (
    <section className="grid gap-x-12 gap-y-3 border-t border-hair py-7 md:grid-cols-[220px_minmax(0,1fr)]">
      <h2 className="text-[17px] font-semibold">{heading}</h2>
      <div className="max-w-[60ch]">{children}</div>
    </section>
  );
}

type Changes = Partial<Pick<Account, 'name' | 'valueNames' | 'paperSize'>>;

/** Sends a change of the account; what has been done is said once it has been. */
function useChange() {
  const client = useQueryClient();
  const router = useRouter();
  const { mutate, isPending, error } = useMutation(updateAccountMutation());
  const [done, setDone] = useState<string | null>(null);
  const change = (changes: Changes, words: string, onError?: () => void) => {
    setDone(null);
    mutate(changes, {
      ...(onError ? { onError } : {}),
      onSuccess: (body) => {
        client.setQueryData(accountQuery().queryKey, body);
        setDone(words);
        // The header shows the name, and pages made on the server the names of values.
        router.refresh();
      },
    });
  };
  return { change, isPending, done, errors: error ? errorsOfAnswer(error) : {} };
}

const Done = ({ text }: { text: string | null }) => (
  <p role="status" className="mt-2 text-[13.5px] text-soft">
    {text}
  </p>
);

function NameForm({ account }: { account: Account }) {
  const { change, isPending, done, errors } = useChange();
  const [name, setName] = useState(account.name);
  const send = (event: FormEvent) => {
    event.preventDefault();
    change({ name }, 'The name is changed.');
  };
  return (
    <form onSubmit={send} className="max-w-96">
      <Field label="Name" value={name} autoComplete="name" onChange={(event) => setName(event.target.value)} error={errors.name ?? errors['']} />
      <Button type="submit" className="mt-3" disabled={isPending}>
        Change the name
      </Button>
      <Done text={done} />
    </form>
  );
}

/** One of two, sent as soon as it is chosen. */
function Choice<K extends 'valueNames' | 'paperSize'>({
  field,
  label,
  account,
  options,
  words,
}: {
  field: K;
  label: string;
  account: Account;
  options: readonly (readonly [Account[K], string])[];
  words: Record<Account[K], string>;
}) {
  const { change, done, errors } = useChange();
  // What has been chosen shows at once; a refusal takes it back.
  const [chosen, setChosen] = useState<Account[K] | null>(null);
  const value = chosen ?? account[field];
  const choose = (next: Account[K]) => {
    setChosen(next);
    change({ [field]: next } as Changes, 'Kept.', () => setChosen(null));
  };
  return (
    <>
      <Segments label={label} value={value} options={options} onChange={choose} />
      <p className="mt-2 text-[14px] text-soft">{words[value]}</p>
      {Object.values(errors)[0] && (
        <p role="alert" className="mt-1 text-[13.5px] text-mark">
          {Object.values(errors)[0]}
        </p>
      )}
      <Done text={done} />
    </>
  );
}

function Sessions() {
  const { mutate, isPending, error } = useMutation(signOutEverywhereMutation());
  return (
    <>
      <div className="flex flex-wrap items-baseline gap-x-6 gap-y-3">
        <SignOutButton text="Sign out here" />
        <Button disabled={isPending} onClick={() => mutate(undefined, { onSuccess: () => void signOut({ callbackUrl: '/sign-in' }) })}>
          Sign out everywhere
        </Button>
      </div>
      <p className="mt-2 text-[14px] text-soft">Everywhere ends the sessions of all browsers, this one too. Work that is not saved yet stays in its browser.</p>
      {error && (
        <p role="alert" className="mt-2 text-mark">
          {error.message}
        </p>
      )}
    </>
  );
}

/** One's own name, names of values, paper, password and sessions. */
export function AccountPanels() {
  const { data: account, error, isPending, refetch } = useQuery(accountQuery());
  if (isPending) return <p className="mt-8 text-soft">Opening…</p>;
  if (error) {
    return (
      <Failed className="mt-8" message={error.message} onRetry={() => void refetch()} />
    );
  }
  return (
    <div className="mt-8">
      <Panel heading="You">
        <NameForm account={account} />
        <p className="mt-3 text-[14px] text-soft">
          {`${account.email}, ${account.role}, since ${account.createdAt.toLocaleDateString()}. Roles are changed by an administrator.`}
        </p>
      </Panel>
      <Panel heading="Names of values">
        <Choice
          field="valueNames"
          label="Names of values"
          account={account}
          options={[['american', 'American'], ['british', 'British']]}
          words={{ american: 'Whole note, half note, quarter note, eighth note.', british: 'Semibreve, minim, crotchet, quaver.' }}
        />
      </Panel>
      <Panel heading="Paper">
        <Choice
          field="paperSize"
          label="Paper"
          account={account}
          options={[['a4', 'A4'], ['letter', 'Letter']]}
          words={{ a4: '210 by 297 mm.', letter: '8½ by 11 inches.' }}
        />
      </Panel>
      <Panel heading="Password">
        <PasswordForm email={account.email} />
      </Panel>
      <Panel heading="Signed in">
        <Sessions />
      </Panel>
    </div>
  );
}
