'use client';

import { useMutation } from '@tanstack/react-query';
import { type FormEvent, useRef, useState } from 'react';
import { changePasswordMutation } from '@/lib/client/account-queries';
import { errorsOf, errorsOfAnswer, type FormErrors } from '@/lib/client/form-errors';
import { ADDRESS_AS_PASSWORD, changePasswordBody, isAddress, PASSWORD_LENGTH } from '@/lib/schemas/account';
import { Button } from '../ui/button';
import { Field } from '../ui/field';

/** The present password and a new one. */
export function PasswordForm({ email }: { email: string }) {
  const { mutate, isPending } = useMutation(changePasswordMutation());
  const [errors, setErrors] = useState<FormErrors>({});
  const [isDone, setDone] = useState(false);
  const form = useRef<HTMLFormElement>(null);
  const send = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const typed = new FormData(event.currentTarget);
    const body = { current: String(typed.get('current') ?? ''), next: String(typed.get('next') ?? '') };
    const wrong = errorsOf(changePasswordBody, body) ?? (isAddress(body.next, email) ? { next: ADDRESS_AS_PASSWORD } : null);
    setErrors(wrong ?? {});
    setDone(false);
    if (wrong) return;
    mutate(body, {
      onSuccess: () => {
        form.current?.reset();
        setDone(true);
      },
      onError: (error) => setErrors(errorsOfAnswer(error)),
    });
  };
  return (
    <form ref={form} onSubmit={send} noValidate className="grid max-w-96 gap-4">
      <input type="text" name="username" autoComplete="username" value={email} readOnly hidden />
      <Field label="Present password" name="current" type="password" autoComplete="current-password" error={errors.current} />
      <Field label="New password" name="next" type="password" autoComplete="new-password" hint={`At least ${PASSWORD_LENGTH.min} characters.`} error={errors.next} />
      {errors[''] && (
        <p role="alert" className="text-mark">
          {errors['']}
        </p>
      )}
      <Button type="submit" className="w-fit" disabled={isPending}>
        Change the password
      </Button>
      <p role="status" className="text-[13.5px] text-soft">
        {isDone && 'The password is changed. Every other browser has been signed out; this one goes on.'}
      </p>
    </form>
  );
}
