import type { Metadata } from 'next';
import Link from 'next/link';
import { WallFigure } from '@/components/figures/wall-figure';
import { Caution } from '@/components/layout/caution';
import { Passage } from '@/components/layout/page-frame';
import { buttonClass } from '@/components/ui/button';
import { paths } from '@/lib/paths';
import { whatItDoes, whatItDoesNot } from './front-page-text';

export const metadata: Metadata = {
  title: { absolute: 'Underfall: seepage under and through hydraulic structures' },
};

export default function FrontPage() {
  return (
    <>
      <div className="mx-auto grid w-full max-w-page gap-6 px-4 pt-8 pb-2 sm:px-8 sm:pt-14">
        <h1 className="max-w-[19ch] font-serif text-[2.5rem] leading-[1.06] font-normal tracking-[-0.02em] sm:text-[4rem]">
          How much water passes under, and how sure that is.
        </h1>
        <p className="max-w-[56ch] text-lg text-secondary sm:text-xl">
          Draw a section of a dam, weir, levee or cofferdam. Underfall answers with a discharge bracketed from
          both sides, a flow net, and every check beside its hand calculation.
        </p>
        <p className="flex flex-wrap gap-3">
          <Link href={paths.signUp()} className={buttonClass('solid')}>
            Set up a practice
          </Link>
          <Link href={paths.signIn()} className={buttonClass('plain')}>
            Sign in
          </Link>
        </p>
      </div>
      <figure className="mb-6">
        <WallFigure className="h-[22rem] sm:h-[27rem] 2xl:h-[36rem]" />
        <figcaption className="mx-auto max-w-page px-4 pt-3 text-sm text-secondary sm:px-8">
          One wall in deep, even ground: per cent of the head left, in ten equal drops. This net has an exact
          solution; it is one of those the solver is held against.
        </figcaption>
      </figure>
      <div className="mx-auto max-w-page px-4 pb-10 sm:px-8">
        {whatItDoes.map(({ title, text }) => (
          <Passage key={title} title={title}>
            <p className="max-w-[66ch]">{text}</p>
          </Passage>
        ))}
        <Passage title="Where it stops">
          <ul className="grid max-w-[66ch] list-[square] gap-2 pl-5">
            {whatItDoesNot.map((text) => (
              <li key={text}>{text}</li>
            ))}
          </ul>
        </Passage>
        <Passage title="Caution">
          <Caution />
        </Passage>
      </div>
    </>
  );
}
