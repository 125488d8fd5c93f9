import { select } from 'd3';
import { memo, useEffect, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { composeFigure, steadyLabels, type Figure, type Steady } from '../figure/figure.ts';
import { drawScene } from '../figure/draw.ts';
import { timed } from '../store/times.ts';
import { useApp, useWords } from './context.ts';
import { useMapHands } from './mapHands.ts';

/** Size in CSS pixels that a page takes to fit a box. */
function fitted(page: { width: number; height: number }, box: { width: number; height: number }) {
  const room = 18;
  const k = Math.min((box.width - 2 * room) / page.width, (box.height - 2 * room) / page.height);
  return { width: Math.max(200, page.width * k), height: Math.max(140, page.height * k) };
}

/** The page on the bench: the figure as it will be exported, and all of it can be taken hold of. */
export const Bench = memo(function Bench() {
  const words = useWords();
  const results = useApp((s) => s.results);
  const sheet = useApp((s) => s.resultsOf);
  const selected = useApp((s) => s.selected);
  const snapped = useApp((s) => s.hint?.boundary ?? null);
  const holding = useApp((s) => s.holding);
  // Labels as they stood when the hand took hold.
  const [steady, setSteady] = useState<Steady | null>(null);
  const figure = useMemo<Figure | null>(
    () =>
      sheet && results
        ? timed('compose', () =>
            composeFigure(sheet, results, sheet.views[0]!.id, words, steady ?? undefined),
          )
        : null,
    [sheet, results, words, steady],
  );
  const latest = useRef(figure);
  useLayoutEffect(() => {
    latest.current = figure;
  }, [figure]);
  useEffect(() => {
    setSteady(holding && latest.current ? steadyLabels(latest.current) : null);
  }, [holding]);
  const benchRef = useRef<HTMLDivElement>(null);
  const svgRef = useRef<SVGSVGElement>(null);
  const [box, setBox] = useState({ width: 800, height: 500 });

  useEffect(() => {
    const observer = new ResizeObserver(([entry]) => {
      if (entry) setBox({ width: entry.contentRect.width, height: entry.contentRect.height });
    });
    observer.observe(benchRef.current!);
    return () => observer.disconnect();
  }, []);

  useLayoutEffect(() => {
    const svg = svgRef.current;
    if (svg && figure) timed('draw', () => drawScene(svg, figure.scene, { interactive: true }));
  }, [figure]);

  useLayoutEffect(() => {
    const svg = svgRef.current;
    if (!svg || !figure) return;
    select(svg)
      .selectAll<SVGElement, unknown>('[data-of]')
      .classed('selected', function () {
        return selected !== null && this.dataset.of === selected;
      })
      .classed('snapped', function () {
        return snapped !== null && this.dataset.of === snapped;
      });
  }, [figure, selected, snapped]);

  const hands = useMapHands(svgRef, figure);
  const size = figure ? fitted(figure.scene, box) : null;
  return (
    <div className="bench" ref={benchRef}>
      <div
        className="page"
        tabIndex={0}
        role="group"
        aria-roledescription={words.editor.map}
        aria-label={words.editor.mapHelp}
        style={size ? { width: size.width, height: size.height } : { visibility: 'hidden' }}
        {...hands}
      >
        <svg ref={svgRef} />
      </div>
      {figure && figure.scene.unplaced.length > 0 && (
        <p className="unplaced">
          {words.editor.noRoom(figure.scene.unplaced.map(({ text }) => text))}
        </p>
      )}
    </div>
  );
});
