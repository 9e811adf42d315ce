'use client';

import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { type FormEvent, useState } from 'react';
import { registerMutation } from '@/lib/client/account-queries';
import { errorsOf, errorsOfAnswer, type FormErrors } from '@/lib/client/form-errors';
import { type OfferedRole, offeredRoles, PASSWORD_LENGTH, registerBody } from '@/lib/schemas/account';
import { Button } from '../ui/button';
import { Field } from '../ui/field';

const ROLES: Record<OfferedRole, string> = {
  composer: 'Composer: I make pieces, or play them',
  teacher: 'Teacher: I set and mark exercises',
  student: 'Student: I learn and answer',
};

/** Name, e-mail, password and role. Afterwards one signs in, whether the address was known or not. */
export function RegisterForm({ next }: { next: string }) {
  const router = useRouter();
  const { mutate, isPending } = useMutation(registerMutation());
  const [role, setRole] = useState<OfferedRole>('composer');
  const [errors, setErrors] = useState<FormErrors>({});
  const send = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const text = (name: string) => String(form.get(name) ?? '');
    const body = { name: text('name'), email: text('email'), password: text('password'), role };
    const wrong = errorsOf(registerBody, body);
    setErrors(wrong ?? {});
    if (wrong) return;
    mutate(body, {
      onSuccess: () => router.push(`/sign-in?${new URLSearchParams({ registered: '1', next })}`),
      onError: (error) => setErrors(errorsOfAnswer(error)),
    });
  };
  return (
    <form onSubmit={send} noValidate className="mt-6 grid max-w-96 gap-4">
      <Field label="Name" name="name" autoComplete="name" error={errors.name} />
      <Field label="E-mail" name="email" type="email" autoComplete="username" error={errors.email} />
      <Field
        label="Password"
        name="password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${PASSWORD_LENGTH.min} characters. A few words in a row are easy to keep and hard to guess.`}
        error={errors.password}
      />
      <fieldset>
        <legend className="mb-1">You are a</legend>
        {offeredRoles.map((one) => (
          <label key={one} className="flex cursor-pointer items-baseline gap-2.5 py-1">
            <input type="radio" name="role" value={one} checked={role === one} onChange={() => setRole(one)} className="accent-ink" />
            {ROLES[one]}
          </label>
        ))}
      </fieldset>
      {errors[''] && (
        <p role="alert" className="text-mark">
          {errors['']}
        </p>
      )}
      <Button type="submit" kind="strong" disabled={isPending}>
        Make an account
      </Button>
    </form>
  );
}
