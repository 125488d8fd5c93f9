import { barometerRange, localPressure } from '../../core/sheet/site.ts';
import type { Site } from '../../core/sheet/schema.ts';
import { format, formatReading, gaugeClasses, parseReading } from '../../core/units/index.ts';
import { freshId, withSite } from '../store/edits.ts';
import type { Sentence } from '../words/sentence.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { Folding } from './Folding.tsx';
import { tried } from './say.ts';

type Editable = { -readonly [K in keyof Site]: Site[K] };

/** A site without one of its optional sayings. */
function without(site: Site, key: keyof Site): Site {
  const rest: Partial<Editable> = { ...site };
  delete rest[key];
  return rest as Site;
}

/** Where readings are taken: the air outside, and how well the instruments tell. */
export function Sites() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;

  const commit =
    (site: Site) =>
    (field: string, text: string): string | null => {
      const empty = text.trim() === '';
      const put = (change: (now: Site) => Site): null => {
        store.getState().edit(`change ${site.name}`, (s) => withSite(s, site.id, change));
        return null;
      };
      const gauge = site.gauge && 'class' in site.gauge ? site.gauge : null;
      switch (field) {
        case 'name':
          return put((now) => ({ ...now, name: text.slice(0, 200) }));
        case 'altitude': {
          if (empty) return put((now) => without(now, 'altitude'));
          const read = tried(words, () => {
            const { text: canonical } = parseReading(text, 'altitude', { defaultUnit: 'm' });
            localPressure({ id: site.id, name: '', altitude: canonical });
            return canonical;
          });
          return 'trouble' in read ? read.trouble : put((now) => ({ ...now, altitude: read.ok }));
        }
        case 'barometer': {
          if (empty) return put((now) => without(now, 'barometer'));
          const read = tried(words, () =>
            parseReading(text, 'pressure', { defaultUnit: 'kPa', defaultKind: 'absolute' }),
          );
          if ('trouble' in read) return read.trouble;
          if (
            read.ok.kind !== 'absolute' ||
            !(read.ok.value >= barometerRange.min && read.ok.value <= barometerRange.max)
          )
            return e.barometerRange;
          return put((now) => ({ ...now, barometer: read.ok.text }));
        }
        case 'barometerError': {
          if (empty) return put((now) => without(now, 'barometerError'));
          const read = tried(words, () =>
            parseReading(text, 'pressureDifference', { defaultUnit: 'kPa' }),
          );
          if ('trouble' in read) return read.trouble;
          return put((now) => ({ ...now, barometerError: read.ok.text }));
        }
        case 'probe': {
          if (empty) return put((now) => without(now, 'probe'));
          const read = tried(words, () =>
            parseReading(text, 'temperatureDifference', { defaultUnit: 'K' }),
          );
          if ('trouble' in read) return read.trouble;
          return put((now) => ({ ...now, probe: read.ok.text }));
        }
        case 'class': {
          if (text === 'none') return put((now) => without(now, 'gauge'));
          const known = gaugeClasses.find((c) => String(c) === text);
          if (known === undefined) return null;
          return put((now) => ({
            ...now,
            gauge: {
              class: known,
              low: gauge?.low ?? '0 bar(g)',
              high: gauge?.high ?? '10 bar(g)',
            },
          }));
        }
        case 'low':
        case 'high': {
          if (!gauge) return null;
          const read = tried(words, () => {
            const unit = parseReading(gauge.high, 'pressure').unit;
            return parseReading(text, 'pressure', { defaultUnit: unit, defaultKind: 'gauge' });
          });
          if ('trouble' in read) return read.trouble;
          return put((now) => ({ ...now, gauge: { ...gauge, [field]: read.ok.text } }));
        }
      }
      return null;
    };

  const sentence = (site: Site): Sentence => {
    const { decimal } = words;
    const gauge = site.gauge && 'class' in site.gauge ? site.gauge : null;
    const read = (
      text: string | undefined,
      quantity: Parameters<typeof parseReading>[1],
    ): string => (text === undefined ? '' : formatReading(parseReading(text, quantity), decimal));
    const local = format(localPressure(site), 'kPa', { digits: 4, kind: 'absolute', decimal });
    return words.siteSentence(
      {
        name: site.name,
        altitude: read(site.altitude, 'altitude'),
        barometer: read(site.barometer, 'pressure'),
        barometerError: read(site.barometerError, 'pressureDifference'),
        gaugeClass: gauge ? String(gauge.class) : 'none',
        low: gauge ? read(gauge.low, 'pressure') : null,
        high: gauge ? read(gauge.high, 'pressure') : null,
        probe: read(site.probe, 'temperatureDifference'),
        local,
      },
      gaugeClasses.map(String),
    );
  };

  return (
    <Folding title={e.sites}>
      {sheet.sites.map((site) => (
        <p key={site.id} className="site">
          <Figured sentence={sentence(site)} commit={commit(site)} />
        </p>
      ))}
      <p className="actions">
        <button
          onClick={() =>
            store.getState().edit('add a site', (s) => ({
              ...s,
              sites: [
                ...s.sites,
                {
                  id: freshId(s, 'site'),
                  name: e.newSite(s.sites.length + 1),
                  altitude: '0 m',
                },
              ],
            }))
          }
        >
          {e.addSite}
        </button>
      </p>
    </Folding>
  );
}
