import { AxesAndPage } from './AxesAndPage.tsx';
import { Cautions } from './Cautions.tsx';
import { OnThisMap } from './OnThisMap.tsx';
import { Selected } from './Selected.tsx';
import { Sites } from './Sites.tsx';

/** The column at the side: what is on the map, what is selected, cautions, sites, axes and page. */
export function SideColumn() {
  return (
    <aside className="side">
      <OnThisMap />
      <Selected />
      <Cautions />
      <Sites />
      <AxesAndPage />
    </aside>
  );
}
