import { cookies } from 'next/headers';
import Link from 'next/link';
import { LivingExample } from '@/components/home/living-example';
import { StartStudy } from '@/components/home/start-study';
import { PersonLinks } from '@/components/person-links';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { Wordmark } from '@/components/ui/wordmark';
import { readPerson } from './person';
import { readTheme } from './theme';

const LINK = 'font-[560] text-ink underline underline-offset-[3px]';

export default async function HomePage() {
  const theme = readTheme(await cookies());
  const person = await readPerson();
  return (
    <>
      <header className="flex px-5 py-5 sm:px-14">
        <nav aria-label="Main" className="ml-auto flex flex-wrap gap-x-6 gap-y-1 text-[15px] text-soft">
          <Link href="/studies">Studies</Link>
          <Link href="/proportions">Proportions</Link>
          <Link href="/check">Check</Link>
          <ThemeSwitch initial={theme} />
          <PersonLinks person={person} />
        </nav>
      </header>
      <main className="mx-auto max-w-[1680px]">
        <div className="px-5 pt-2 sm:px-14 sm:pt-6">
          <h1>
            <Wordmark className="-ml-[0.04em] flex text-[clamp(84px,15vw,206px)] font-[620] leading-[0.86] tracking-[-0.02em]" />
          </h1>
          <div className="mt-8 grid grid-cols-[minmax(0,1fr)] items-start gap-x-16 gap-y-10 lg:grid-cols-2">
            <div>
              <p className="max-w-[33ch] font-serif text-[22px] leading-[1.42] sm:text-[27px]">
                One rhythm, stretched, reversed and passed from hand to hand by an exact rule. Write the rule; read the score; hear it.
              </p>
              <div className="mt-7 flex flex-wrap items-baseline gap-3">
                <StartStudy />
                <Link href="/studies/lock-gates" className="rounded border border-ink px-5 py-2.5 font-[550] leading-tight hover:bg-wash">
                  Open a finished one
                </Link>
              </div>
            </div>
            <LivingExample />
          </div>
        </div>
        <div className="mt-12 grid gap-x-12 gap-y-8 border-t border-hair px-5 py-12 sm:px-14 md:grid-cols-3">
          <div>
            <h2 className="mb-1.5 text-[21px] font-[580] [font-stretch:108%]">The rule is a sentence</h2>
            <p className="max-w-[38ch] text-soft">
              How often, how long, which way round, by whom: each underlined word can be changed, and everything follows. <StartStudy look="link" />
            </p>
          </div>
          <div>
            <h2 className="mb-1.5 text-[21px] font-[580] [font-stretch:108%]">Threads show what it does</h2>
            <p className="max-w-[38ch] text-soft">
              They fan out when the subject is stretched and cross when it is reversed, attack by attack.{' '}
              <Link href="/studies/three-ferries" className={LINK}>
                See a canon that ends together
              </Link>
            </p>
          </div>
          <div>
            <h2 className="mb-1.5 text-[21px] font-[580] [font-stretch:108%]">Numbers that add up</h2>
            <p className="max-w-[38ch] text-soft">
              Exact fractions, sums in the open, and a word when something does not hold.{' '}
              <Link href="/studies/footbridge" className={LINK}>
                Read a score in seven
              </Link>
            </p>
          </div>
        </div>
      </main>
    </>
  );
}
