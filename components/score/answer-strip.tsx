'use client';
import { useEffect, useState } from 'react';
import { useScore, useScoreStore } from '@/components/editor/state/score-context';
import { cn } from '@/lib/cn';
import { composeAnswer } from './answer-phrase';
import { NumberField } from './table/number-field';

/** The question in words, the situations to choose from, the levels of the chosen one, and the answer in one phrase. */
export function AnswerStrip() {
  return (
    <header className="grid gap-3">
      <Question />
      <Situations />
      <AnswerPhrase />
    </header>
  );
}

function Question() {
  const store = useScoreStore();
  const question = useScore(({ document }) => document.question ?? '');
  const title = useScore(({ document }) => document.title);
  const mayChange = useScore(({ detail }) => detail.mayChange);
  return (
    <div>
      <h1 className="text-[1.05rem] font-semibold">{title}</h1>
      {mayChange ? (
        <textarea
          aria-label="The question this section answers"
          rows={1}
          maxLength={2000}
          placeholder="Which question does this section answer?"
          className="field-sizing-content w-full resize-none border-b border-transparent bg-transparent py-0.5 text-lg leading-snug hover:border-rule focus:border-action"
          value={question}
          onChange={(event) => {
            const text = event.target.value.replace(/\n/g, ' ');
            store.getState().edit(
              'Question',
              (draft) => {
                if (text === '') delete draft.question;
                else draft.question = text;
              },
              'question',
            );
          }}
        />
      ) : (
        <p className="text-lg leading-snug">{question}</p>
      )}
    </div>
  );
}

function Situations() {
  const store = useScoreStore();
  const situations = useScore(({ document }) => document.situations);
  const chosen = useScore((state) => state.situationId);
  const index = situations.findIndex(({ id }) => id === chosen);
  const situation = situations[index];
  return (
    <div className="flex flex-wrap items-end gap-x-6 gap-y-2">
      <fieldset className="flex flex-wrap gap-2">
        <legend className="sr-only">Situation</legend>
        {situations.map(({ id, name }) => (
          <label
            key={id}
            className={cn(
              'inline-flex min-h-8 cursor-pointer items-center rounded-full border px-3.5 text-[0.9375rem] has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-action',
              id === chosen ? 'border-ink bg-ink text-paper' : 'border-field text-ink hover:border-ink',
            )}
          >
            <input
              type="radio"
              name="situation"
              className="sr-only"
              checked={id === chosen}
              onChange={() => store.getState().chooseSituation(id)}
            />
            {name ?? id}
          </label>
        ))}
      </fieldset>
      {situation && (
        <div className="flex flex-wrap gap-x-4 gap-y-1">
          {Object.entries(situation.levels).map(([name, level]) => (
            <span key={name} className="inline-flex items-baseline gap-1.5 text-[0.9375rem] text-secondary">
              {name}
              <NumberField
                label={`${name} in ${situation.name ?? situation.id}`}
                quantity="length"
                value={level}
                onCommit={(value) =>
                  value !== undefined &&
                  store.getState().edit(`Level ${name}`, (draft) => {
                    draft.situations[index]!.levels[name] = value;
                  })
                }
              />
            </span>
          ))}
        </div>
      )}
    </div>
  );
}

function AnswerPhrase() {
  const answer = useScore((state) => state.answer);
  const refusal = useScore((state) => state.refusal);
  const document = useScore((state) => state.document);
  const situationId = useScore((state) => state.situationId);
  const units = useScore((state) => state.units);
  const result = answer?.result.situations.find(({ id }) => id === situationId);
  const isRefused = refusal !== null && refusal.document === document;
  const isCurrent = answer?.document === document && !isRefused;
  return (
    <div
      role="status"
      aria-label="Answer"
      aria-busy={!isCurrent && !isRefused}
      className="min-h-[3.2rem] border-y border-rule py-2"
    >
      {isRefused ? (
        <p className="text-attention">
          <strong className="font-semibold">No number is shown. </strong>
          {refusal.problem.detail}
        </p>
      ) : result ? (
        <p
          className={cn(
            'flex flex-wrap items-baseline gap-x-7 gap-y-1 transition-opacity',
            !isCurrent && 'opacity-45',
          )}
        >
          {composeAnswer(result, units).map(({ key, value, unit, remark }) => (
            <span key={key} data-part={key} className="inline-flex flex-wrap items-baseline gap-x-1.5">
              <span className="figures text-[clamp(1.5rem,2.6vw,2.15rem)] leading-none font-light tracking-tight">
                {value}
              </span>
              <span className="text-[0.9375rem]">{unit}</span>
              {remark && <span className="text-[0.8125rem] text-secondary">({remark})</span>}
            </span>
          ))}
          {!isCurrent && answer && <Age at={answer.at} />}
        </p>
      ) : (
        <p className="text-secondary">Solving …</p>
      )}
      {result && !isRefused && (
        <p className="mt-1 text-[0.8125rem] text-secondary">
          {describeCertainty(result.discharge.kind, answer?.effort)}
        </p>
      )}
    </div>
  );
}

function describeCertainty(kind: 'bound' | 'estimate', effort: 'live' | 'full' | undefined): string {
  const words =
    kind === 'bound'
      ? 'The discharge lies between the two figures for this drawn section and these permeabilities; the ground is another matter.'
      : 'The range of the discharge is an estimate from the mesh, for this drawn section and these permeabilities.';
  return effort === 'live' ? `${words} Still closing in.` : words;
}

/** How old the greyed answer is, once that is worth saying. */
function Age({ at }: { at: number }) {
  const [seconds, setSeconds] = useState(0);
  useEffect(() => {
    const timer = setInterval(() => setSeconds(Math.round((Date.now() - at) / 1000)), 1000);
    return () => clearInterval(timer);
  }, [at]);
  return seconds >= 2 ? (
    <span className="text-[0.8125rem] text-secondary">answer of {seconds} s ago</span>
  ) : null;
}
