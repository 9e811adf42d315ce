import Link from 'next/link';
import { SignOutButton } from './account/sign-out-button';

export type Person = { readonly name: string; readonly role: string } | null;

/** Who is signed in, leading to the account, and the way out; else the way in. */
export function PersonLinks({ person }: { person: Person }) {
  if (!person) return <Link href="/sign-in">Sign in</Link>;
  return (
    <>
      <Link href="/account" className="max-w-[32ch] truncate hover:text-ink">{`${person.name} · ${person.role}`}</Link>
      <SignOutButton className="no-underline! hover:text-ink" />
    </>
  );
}
