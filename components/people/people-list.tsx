'use client';

import { type InfiniteData, useInfiniteQuery, useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { peopleQuery, updatePersonMutation } from '@/lib/client/people-queries';
import { type Role, roles } from '@/lib/schemas/account';
import { type PeopleWire, type Person, personItem } from '@/lib/schemas/people';
import { Button, TextButton } from '../ui/button';
import { Failed } from '../ui/failed';
import { Field } from '../ui/field';
import { useSettled } from '../ui/use-settled';

function PersonRow({ person, isSelf, onChanged }: { person: Person; isSelf: boolean; onChanged: (person: Person) => void }) {
  const { mutate, isPending, error } = useMutation(updatePersonMutation());
  const change = (changes: { role?: Role; disabled?: boolean }) => mutate({ id: person.id, ...changes }, { onSuccess: onChanged });
  const isClosed = person.disabledAt !== null;
  return (
    <tr className="flex flex-wrap items-baseline gap-x-6 gap-y-1 border-b border-hair py-2.5 align-baseline md:table-row">
      <th scope="row" className="max-w-[26ch] text-left font-semibold max-md:w-full max-md:max-w-none md:py-2.5 md:pr-6 [overflow-wrap:anywhere]">
        {person.name}
        {isSelf && <span className="font-normal text-soft"> (you)</span>}
      </th>
      <td className="max-w-[34ch] text-soft max-md:w-full max-md:max-w-none md:py-2.5 md:pr-6 [overflow-wrap:anywhere]">{person.email}</td>
      <td className="md:py-2.5 md:pr-6">
        {isSelf ? (
          person.role
        ) : (
          <select
            aria-label={`Role of ${person.name}`}
            value={person.role}
            disabled={isPending}
            onChange={(event) => change({ role: event.target.value as Role })}
            className="rounded border border-hair bg-paper px-2 py-1"
          >
            {roles.map((role) => (
              <option key={role}>{role}</option>
            ))}
          </select>
        )}
      </td>
      <td className="md:py-2.5 md:pr-6">{isClosed ? `closed ${person.disabledAt?.toLocaleDateString()}` : 'open'}</td>
      <td className="md:py-2.5">
        {!isSelf && (
          <TextButton disabled={isPending} aria-label={`${isClosed ? 'Open' : 'Close'} the account of ${person.name}`} onClick={() => change({ disabled: !isClosed })}>
            {isClosed ? 'Open' : 'Close'}
          </TextButton>
        )}
        {error && (
          <span role="alert" className="block max-w-[40ch] text-[13.5px] text-mark">
            {error.message}
          </span>
        )}
      </td>
    </tr>
  );
}

/** Puts a changed person in their place in every page that is kept. */
const withPerson = (person: Person) => (data: InfiniteData<PeopleWire, string> | undefined) =>
  data && { ...data, pages: data.pages.map((page) => ({ ...page, people: page.people.map((one) => (one.id === person.id ? personItem.encode(person) : one)) })) };

/** Accounts with their roles; a role is changed in its row, an account closed and opened again. */
export function PeopleList({ ownId }: { ownId: string }) {
  const client = useQueryClient();
  const [text, setText] = useState('');
  const q = useSettled(text.trim());
  const { data: people, error, isPending, hasNextPage, fetchNextPage, isFetchingNextPage, refetch } = useInfiniteQuery(peopleQuery(q));
  const onChanged = (person: Person) => client.setQueriesData<InfiniteData<PeopleWire, string>>({ queryKey: ['people'] }, withPerson(person));
  return (
    <>
      <Field className="mt-6 max-w-96" label="Find by name or address" type="search" maxLength={100} value={text} onChange={(event) => setText(event.target.value)} />
      {isPending && <p className="mt-6 text-soft">Opening…</p>}
      {error && <Failed className="mt-6" message={error.message} onRetry={() => void refetch()} />}
      {people?.length === 0 && <p className="mt-6 text-soft">Nobody is called that.</p>}
      {people && people.length > 0 && (
        <div className="mt-6">
          <table className="block w-full border-t border-ink md:table">
            <thead className="max-md:sr-only">
              <tr className="border-b border-hair text-left text-[13px] text-soft">
                {['Name', 'Address', 'Role', 'Account', ''].map((heading) => (
                  <th key={heading} scope="col" className="py-1.5 pr-6 font-normal">
                    {heading || <span className="sr-only">Change</span>}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody className="block md:table-row-group">
              {people.map((person) => (
                <PersonRow key={person.id} person={person} isSelf={person.id === ownId} onChanged={onChanged} />
              ))}
            </tbody>
          </table>
        </div>
      )}
      {hasNextPage && (
        <Button className="mt-5" disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
          Show more
        </Button>
      )}
    </>
  );
}
