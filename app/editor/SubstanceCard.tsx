import { useEffect, useId, useRef, useState } from 'react';
import { checkRows, evaluateCheck, type CheckResult } from '../../core/checks/check.ts';
import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { catalogue } from '../../core/substances/catalogue.ts';
import { cardSections, checkSummary, type CardSection } from '../card/card.ts';
import { checkText } from '../card/checkText.ts';
import { useWords } from './context.ts';
import './substanceCard.css';

interface Known {
  readonly m: Medium;
  readonly checks: readonly CheckResult[];
}

/** A substance with its checks, computed in slices so that the page stays awake; null while it runs. */
function useChecked(id: string): Known | null {
  const [known, setKnown] = useState<Known | null>(null);
  useEffect(() => {
    let wanted = true;
    void (async () => {
      const entry = catalogue.find((e) => e.id === id);
      if (!entry) return;
      const [substance, published] = await Promise.all([entry.load(), entry.checks()]);
      const m = medium(substance);
      const rows = checkRows(published);
      const checks: CheckResult[] = [];
      for (let i = 0; i < rows.length && wanted; i += 40) {
        checks.push(...rows.slice(i, i + 40).map((row) => evaluateCheck(m, row)));
        await new Promise((resolve) => setTimeout(resolve));
      }
      if (wanted) setKnown({ m, checks });
    })();
    return () => {
      wanted = false;
    };
  }, [id]);
  return known?.m.substance.id === id ? known : null;
}

function Section({ section }: { readonly section: CardSection }) {
  const { title, rows, note } = section;
  const named = rows.some(({ label }) => label !== '');
  return (
    <section>
      <h3>{title}</h3>
      {named ? (
        <dl>
          {rows.map(({ label, text, source }, i) => (
            <div key={i} className="pair">
              <dt>{label}</dt>
              <dd>
                {text}
                {source && <small>{source}</small>}
              </dd>
            </div>
          ))}
        </dl>
      ) : (
        <ul>
          {rows.map(({ text }, i) => (
            <li key={i}>{text}</li>
          ))}
        </ul>
      )}
      {note && <p>{note}</p>}
    </section>
  );
}

function EveryValue({ checks }: { readonly checks: readonly CheckResult[] }) {
  const words = useWords();
  const { card } = words;
  const [open, setOpen] = useState(false);
  return (
    <section>
      <h3>
        <button className="fold" aria-expanded={open} onClick={() => setOpen(!open)}>
          {card.everyValue}
        </button>
      </h3>
      {open && (
        <div className="scroll" tabIndex={0} role="region" aria-label={card.everyValue}>
          <table>
            <thead>
              <tr>
                {[
                  card.quantity,
                  card.state,
                  card.published,
                  card.computed,
                  card.deviation,
                  card.ofTolerance,
                ].map((head) => (
                  <th key={head} scope="col">
                    {head}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {checks.map((check, i) => {
                const text = checkText(check, words);
                const origin = card.origin[check.provenance] ?? check.provenance;
                return (
                  <tr key={i} title={`${check.source} (${origin})`}>
                    <th scope="row">{text.quantity}</th>
                    <td>{text.state}</td>
                    <td>{text.published}</td>
                    <td>{text.computed}</td>
                    <td>{text.deviation}</td>
                    <td>{text.share}</td>
                  </tr>
                );
              })}
            </tbody>
          </table>
        </div>
      )}
    </section>
  );
}

/** What there is to say of a substance, and how the values its sources print are met. */
export function SubstanceCard({
  id,
  onClose,
}: {
  readonly id: string;
  readonly onClose: () => void;
}) {
  const words = useWords();
  const { card } = words;
  const dialog = useRef<HTMLDialogElement>(null);
  const heading = useId();
  const known = useChecked(id);
  useEffect(() => {
    const shown = dialog.current;
    if (shown && !shown.open) shown.showModal();
    return () => shown?.close();
  }, []);
  return (
    <dialog
      ref={dialog}
      className="substance-card"
      aria-labelledby={heading}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
    >
      <header>
        <h2 id={heading}>{card.title(words.substance(id))}</h2>
        <button onClick={onClose}>{card.close}</button>
      </header>
      {known ? (
        <>
          {[...cardSections(known.m, words), checkSummary(known.checks, words)].map((section) => (
            <Section key={section.title} section={section} />
          ))}
          <EveryValue checks={known.checks} />
        </>
      ) : (
        <section aria-live="polite">{card.checking}</section>
      )}
    </dialog>
  );
}
