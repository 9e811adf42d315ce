import Link from 'next/link';

export default function NotFound() {
  return (
    <main className="mx-auto max-w-[62ch] px-5 py-16 text-[17px] leading-relaxed">
      <h1 className="text-[34px] font-[560] leading-tight [font-stretch:112%]">There is no such page</h1>
      <p className="mt-4">
        The address leads nowhere.{' '}
        <Link href="/studies" className="underline underline-offset-[3px]">
          All studies
        </Link>
      </p>
    </main>
  );
}
