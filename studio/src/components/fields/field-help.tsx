import { Popover } from 'radix-ui';

export type FieldHelpText = {
  what: string;
  /** Usual values, with unit. */
  usual?: string;
  /** What is allowed at all, with unit. */
  allowed: string;
  source?: string;
};

type Props = { label: string; help: FieldHelpText };

/** A field's label, which opens what the quantity is, its usual values and their source. */
export function FieldHelp({ label, help }: Props) {
  return (
    <Popover.Root>
      <Popover.Trigger className="f-help">{label}</Popover.Trigger>
      <Popover.Portal>
        <Popover.Content className="help" align="start" sideOffset={4} collisionPadding={8} aria-label={label}>
          <h4>{label}</h4>
          <p>{help.what}</p>
          <dl>
            {help.usual && <Row name="Usual" text={help.usual} />}
            <Row name="Allowed" text={help.allowed} />
            {help.source && <Row name="Source" text={help.source} />}
          </dl>
          <Popover.Close className="lnk">Close</Popover.Close>
        </Popover.Content>
      </Popover.Portal>
    </Popover.Root>
  );
}

function Row({ name, text }: { name: string; text: string }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{text}</dd>
    </div>
  );
}
