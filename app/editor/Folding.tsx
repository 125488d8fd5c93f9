import { useId, useState, type ReactNode } from 'react';

/** A part of the workplace that folds to its heading; open at first. */
export function Folding({
  title,
  children,
}: {
  readonly title: string;
  readonly children: ReactNode;
}) {
  const [open, setOpen] = useState(true);
  const id = useId();
  return (
    <section aria-labelledby={id}>
      <h2 id={id}>
        <button className="fold" aria-expanded={open} onClick={() => setOpen(!open)}>
          {title}
        </button>
      </h2>
      {open && children}
    </section>
  );
}
