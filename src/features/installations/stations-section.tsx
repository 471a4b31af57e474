import { useState } from 'react';
import { STATION_KINDS, stationSchema } from '../../../shared/contracts/installations';
import type { StationRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field, SelectField } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { checkInput, typedNumber } from '../../lib/check-input';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { standing } from './standing';

function StationForm({
  station,
  wish,
  words,
  onDone,
  onCancel,
}: {
  station: Pick<StationRecord, 'name' | 'kind' | 'places'> | null;
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  onDone: () => void;
  onCancel: () => void;
}) {
  const [name, setName] = useState(station?.name ?? '');
  const [kind, setKind] = useState(station?.kind ?? 'bench');
  const [places, setPlaces] = useState(String(station?.places ?? 4));
  const form = useForm({
    request: () => {
      const checked = checkInput(stationSchema, { name, kind, places: typedNumber(places) });
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  return (
    <form className="grid gap-4 py-3" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <div className="grid items-start gap-x-5 gap-y-3 sm:grid-cols-[minmax(0,1fr)_12rem_9rem]">
        <Field
          label="name"
          value={name}
          onChange={(event) => setName(event.target.value)}
          error={form.problem('name')}
        />
        <SelectField
          label="kind"
          value={kind}
          onChange={(event) => setKind(event.target.value)}
          error={form.problem('kind')}
        >
          {STATION_KINDS.map((one) => (
            <option key={one}>{one}</option>
          ))}
        </SelectField>
        <Field
          label="places"
          unit="people"
          inputMode="numeric"
          value={places}
          onChange={(event) => setPlaces(event.target.value)}
          error={form.problem('places')}
        />
      </div>
      <div className="flex flex-wrap items-center gap-6">
        <Action type="submit" look="main" busy={form.busy}>
          {words}
        </Action>
        <Action look="words" onClick={onCancel}>
          Leave it
        </Action>
      </div>
    </form>
  );
}

/** Where steps are done. */
export function StationsSection({ installationId, closed }: { installationId: string; closed: boolean }) {
  const stations = standing(useLiveMap(installationId, 'stations'), (a, b) => a.position - b.position);
  const steps = useLiveMap(installationId, 'steps');
  const [editing, setEditing] = useState<string | null>(null);
  const path = `/installations/${installationId}/stations`;
  const places = stations.reduce((sum, station) => sum + station.places, 0);
  const stepsAt = (id: string): number =>
    [...steps.values()].filter((step) => !step.removed && step.stationId === id).length;
  const shut = () => setEditing(null);
  return (
    <section className="grid gap-4" aria-labelledby="stations">
      <DimensionHead
        id="stations"
        right={`${counted(stations.length, 'station')}, ${counted(places, 'place')}`}
      >
        Stations
      </DimensionHead>
      {stations.length === 0 ? (
        <EmptyNote title="No station yet.">
          Name where the work is done: saw, benches, glue, paint bay.
        </EmptyNote>
      ) : (
        <Sheet caption="Stations">
          <thead>
            <tr>
              <th scope="col">station</th>
              <th scope="col">kind</th>
              <th scope="col" className="amount">
                places
              </th>
              <th scope="col" className="amount">
                steps
              </th>
              <th scope="col">
                <span className="sr-only">what you can do</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {stations.map((station) =>
              editing === station.id ? (
                <tr key={station.id}>
                  <td colSpan={5}>
                    <StationForm
                      station={station}
                      wish={{ method: 'PUT', path: `${path}/${station.id}` }}
                      words="Keep it"
                      onDone={shut}
                      onCancel={shut}
                    />
                  </td>
                </tr>
              ) : (
                <tr key={station.id}>
                  <th scope="row">{station.name}</th>
                  <td data-label="kind">{station.kind}</td>
                  <td data-label="places" className="amount">
                    <Figures>{station.places}</Figures>
                  </td>
                  <td data-label="steps" className="amount">
                    <Figures>{stepsAt(station.id)}</Figures>
                  </td>
                  <td>
                    {!closed && (
                      <span className="flex flex-wrap gap-x-4 desk:justify-end">
                        <Action
                          look="words"
                          label={`Change ${station.name}`}
                          onClick={() => setEditing(station.id)}
                        >
                          Change
                        </Action>
                        <ConfirmAction
                          words="Take out"
                          look="words"
                          label={`Take out ${station.name}`}
                          title={`Take out the station ${station.name}?`}
                          confirm="Take it out"
                          wish={{ method: 'DELETE', path: `${path}/${station.id}` }}
                        >
                          <p>{takeOutWords(stepsAt(station.id))}</p>
                        </ConfirmAction>
                      </span>
                    )}
                  </td>
                </tr>
              ),
            )}
          </tbody>
        </Sheet>
      )}
      {editing === 'new' && (
        <StationForm
          station={null}
          wish={{ method: 'POST', path }}
          words="Add it"
          onDone={shut}
          onCancel={shut}
        />
      )}
      {editing === null && !closed && (
        <div>
          <Action onClick={() => setEditing('new')}>Add a station</Action>
        </div>
      )}
    </section>
  );
}

const takeOutWords = (steps: number): string =>
  steps === 0
    ? 'No step is done there.'
    : `${counted(steps, 'step')} ${steps === 1 ? 'is' : 'are'} done there. It can only go when none is; change the template of those pieces first.`;
