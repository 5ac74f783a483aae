import { TextField } from '../../../components/fields/text-field.tsx';
import { useDesk, useDispatch } from '../hooks/use-desk.ts';
import { isMoved } from '../model/changes.ts';
import { valueAt } from '../../../lib/study-path.ts';

type Props = { path: string; label: string };

/** A name in the study, such as the station's. */
export function NameField({ path, label }: Props) {
  const dispatch = useDispatch();
  const value = useDesk(({ sheet }) => valueAt(sheet.draft.study, path)) as string;
  const was = useDesk(({ sheet }) =>
    isMoved(value, sheet.baseline, path)
      ? ((valueAt(sheet.baseline, path) as string | undefined) ?? 'empty')
      : undefined,
  );
  return (
    <TextField
      label={label}
      value={value}
      was={was}
      onText={(text) => dispatch({ type: 'parts', parts: [{ path, value: text }], label, typingAt: path })}
      onLeave={() => dispatch({ type: 'leave-field' })}
    />
  );
}
