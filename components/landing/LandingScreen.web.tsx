import { useRef, type ReactElement } from 'react';
import { YardSketch } from '@/components/landing/YardSketch';
import { LinkButton } from '@/components/ui/LinkButton';
import { TextLink } from '@/components/ui/TextLink';
import { usePageArrival } from '@/components/ui/usePageArrival';

const questions = [
  { question: 'Which spot?', answer: 'Each part of the lawn has its own water budget. The one that reaches its refill line first comes first.' },
  { question: 'Which sprinkler?', answer: 'The one you tested, at a marked position that the hose reaches, and only one on a tap at a time.' },
  { question: 'How long?', answer: 'Depth first, then minutes, from your own cup test. Sprinklers on a hose are far slower than leaflets say.' },
  { question: 'When do I move the hose?', answer: 'At a minute you know beforehand, within your hours at home and your water rule, with a reminder by mail.' },
] as const;

/** The front page: what Dapple does, and the ways in. The build also writes it into `index.html` as plain HTML, which is what a visitor sees first. */
export function LandingScreen(): ReactElement {
  const heading = useRef<HTMLHeadingElement>(null);
  usePageArrival('Dapple', heading);
  return (
    <main id="main" className="l-main">
      <section className="l-hero">
        <div className="l-hero-words">
          <h1 ref={heading} tabIndex={-1}>Water the yard with a hose, without standing over it.</h1>
          <p className="l-lead">
            Dapple plans the watering of yards that have no in-ground sprinklers, measures what the sprinkler really does, and tells the right person when to move the hose.
          </p>
          <div className="l-actions">
            <LinkButton kind="sun" label="Set up your yard" href={'/sign-up'} />
            <LinkButton label="Sign in" href={'/sign-in'} />
          </div>
        </div>
        <div className="l-sketch"><YardSketch /></div>
      </section>

      <section aria-labelledby="four-questions">
        <h2 id="four-questions">Four questions, answered every morning</h2>
        <ol className="l-questions">
          {questions.map(({ question, answer }) => (
            <li key={question}>
              <h3>{question}</h3>
              <p>{answer}</p>
            </li>
          ))}
        </ol>
      </section>

      <section aria-labelledby="without-account">
        <h2 id="without-account">Two things to find out today, without an account</h2>
        <div className="l-cards">
          <article className="l-card">
            <h3><TextLink kind="stretched" href={'/cup-test'}>What does your sprinkler apply?</TextLink></h3>
            <p>Wide open, a portable sprinkler usually applies 0.1 to 0.25 in per hour, a quarter of what in-ground heads do. Set out a few cups and see yours.</p>
          </article>
          <article className="l-card">
            <h3><TextLink kind="stretched" href={'/does-it-fit'}>Does it fit?</TextLink></h3>
            <p>One inch on 5,000 sq ft at 5 gpm takes 10.4 hours, before moves. See whether your lawn fits your tap and your hours at home.</p>
          </article>
        </div>
        <TextLink kind="standalone" href={'/calculators'}>More to find out: moves, hoses, soil, sun and seed</TextLink>
      </section>

      <section className="l-people" aria-labelledby="who">
        <h2 id="who">One yard, the people around it</h2>
        <dl>
          <div>
            <dt>Owner</dt>
            <dd>Knows in ten seconds what to do this morning, and why nothing is due when nothing is.</dd>
          </div>
          <div>
            <dt>Helper</dt>
            <dd>Sees today&apos;s list and nothing else to worry about.</dd>
          </div>
          <div>
            <dt>Consultant</dt>
            <dd>Sees which yards need attention, tunes new seed, and proposes changes with a reason. The owner accepts.</dd>
          </div>
        </dl>
      </section>
    </main>
  );
}
