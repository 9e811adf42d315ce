import type { Metadata } from 'next';
import { TryIt } from '@/components/open-api/try-it';
import { PageHeading } from '@/components/ui/page-heading';
import { OPEN_ROUTES } from '@/lib/schemas/open';
import { PageFrame } from '../page-frame';

export const metadata: Metadata = { title: 'Open API' };

export default function OpenApiPage() {
  return (
    <PageFrame>
      <main className="mx-auto max-w-[1280px] px-5 pb-24 pt-10 sm:px-8 lg:px-12">
        <PageHeading text="Open API" />
        <p className="mb-7 mt-4 max-w-[70ch] text-soft">
          The same answers for programs: JSON in and out, every length an exact fraction as text, 120 questions a minute from one address. As a document:{' '}
          <a href="/api/openapi.json" className="text-ink underline underline-offset-[3px]">
            OpenAPI 3.1
          </a>
          .
        </p>
        {Object.values(OPEN_ROUTES).map(({ path, summary, example }) => (
          <TryIt key={path} path={path} summary={summary} example={JSON.stringify(example, null, 2)} />
        ))}
      </main>
    </PageFrame>
  );
}
