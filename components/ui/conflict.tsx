'use client';
/** Somebody else saved meanwhile: both are shown, and nothing typed is lost. */
import { Button } from './button';
import { Notice } from './sheet';

export interface Conflicting {
  version: number;
  [field: string]: unknown;
}

const show = (value: unknown) =>
  value === '' || value === null || value === undefined ? '(empty)' : String(value);

export function ConflictNotice({
  mine,
  theirs,
  labels,
  onKeepMine,
  onTakeTheirs,
}: {
  mine: Record<string, unknown>;
  theirs: Conflicting;
  labels: Record<string, string>;
  onKeepMine: () => void;
  onTakeTheirs: () => void;
}) {
  const changed = Object.keys(labels).filter((key) => show(mine[key]) !== show(theirs[key]));
  return (
    <Notice
      kind="caution"
      word="Both changed"
      title="Somebody else saved this while you were typing."
      role="alert"
    >
      <dl className="my-2 flex flex-col gap-2">
        {changed.map((key) => (
          <div key={key}>
            <dt className="font-bold">{labels[key]}</dt>
            <dd>mine: {show(mine[key])}</dd>
            <dd>theirs: {show(theirs[key])}</dd>
          </div>
        ))}
      </dl>
      <div className="flex flex-wrap gap-3">
        <Button onClick={onKeepMine}>Keep mine</Button>
        <Button look="secondary" onClick={onTakeTheirs}>
          Take theirs
        </Button>
      </div>
    </Notice>
  );
}
