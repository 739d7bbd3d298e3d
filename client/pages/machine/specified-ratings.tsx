import { HEAT_SETTINGS, type HeatSetting, type MachinePage } from '#shared/schemas/homes.ts';
import { WordLink } from '../../components/key-link.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { ratedWords, unitWords } from '../../format/rating-words.ts';

export const SETTING_WORDS: Record<HeatSetting, string> = {
  high: 'High heat',
  medium: 'Medium heat',
  low: 'Low heat',
};

/** What the machine should have, for each heat setting: runs are judged by it. */
export function SpecifiedRatings({ machine }: { machine: MachinePage }) {
  return (
    <section>
      <SectionHead state="runs are judged by these">Specified to have</SectionHead>
      <ul>
        {HEAT_SETTINGS.map((setting) => (
          <SettingRow key={setting} setting={setting} machine={machine} />
        ))}
      </ul>
      <p className="max-w-read pt-2 text-small text-print">
        The maker’s service sheet inside the machine outranks this page.
      </p>
    </section>
  );
}

function SettingRow({ setting, machine }: { setting: HeatSetting; machine: MachinePage }) {
  const specified = machine.specified.find((each) => each.setting === setting);
  const to = `/machines/${machine.id}/specified/${setting}`;
  return (
    <li className="words grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 border-b border-hair py-1.5 desk:grid-cols-[150px_minmax(0,1fr)_minmax(0,1fr)_auto]">
      <h3 className="text-[1.125rem] font-semibold">{SETTING_WORDS[setting]}</h3>
      {specified ? (
        <>
          <p className="max-desk:col-start-1">
            <b className="font-semibold">{specified.rating.name}</b>
            <br />
            <span className="text-print">{ratedWords(specified.rating)}</span>
          </p>
          <p className="max-desk:col-start-1">
            {specified.limit ? (
              <>
                high limit <b className="font-semibold">{specified.limit.name}</b>
                <br />
                <span className="text-print">
                  opens {specified.limit.opens}
                  {'\u00a0'}
                  {unitWords(specified.limit.unit)}
                </span>
              </>
            ) : (
              <span className="text-print">high limit as usual, 196 °F</span>
            )}
          </p>
        </>
      ) : (
        <p className="text-print max-desk:col-start-1 desk:col-span-2">nothing specified</p>
      )}
      <WordLink
        to={to}
        className="max-desk:col-start-2 max-desk:row-start-1"
        aria-label={`${specified ? 'Change' : 'Set'} what it should have on ${setting} heat`}
      >
        {specified ? 'Change' : 'Set'}
      </WordLink>
    </li>
  );
}
