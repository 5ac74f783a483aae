import { DropdownMenu } from 'radix-ui';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

type MenuProps = { trigger: ReactNode; align?: 'start' | 'end'; children: ReactNode };

/** A list of actions or choices under a button. */
export function Menu({ trigger, align = 'start', children }: MenuProps) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger asChild>{trigger}</DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content className="menu" align={align} sideOffset={6} collisionPadding={8}>
          {children}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}

type ItemProps = { onSelect: () => void; disabled?: boolean; children: ReactNode };

export function MenuItem({ onSelect, disabled, children }: ItemProps) {
  return (
    <DropdownMenu.Item className="menu-item" disabled={disabled} onSelect={onSelect}>
      {children}
    </DropdownMenu.Item>
  );
}

/** A page that the menu leads to. */
export function MenuLink({ to, children }: { to: string; children: ReactNode }) {
  return (
    <DropdownMenu.Item className="menu-item" asChild>
      <Link to={to}>{children}</Link>
    </DropdownMenu.Item>
  );
}

export function MenuHeading({ children }: { children: ReactNode }) {
  return <DropdownMenu.Label className="menu-heading">{children}</DropdownMenu.Label>;
}

export function MenuRule() {
  return <DropdownMenu.Separator className="menu-rule" />;
}

type ChoiceProps<T extends string> = {
  heading: string;
  value: T;
  options: readonly { value: T; label?: string }[];
  onChange: (value: T) => void;
};

/** One of several words inside a menu; the menu stays open so that more can be changed. */
export function MenuChoice<T extends string>({ heading, value, options, onChange }: ChoiceProps<T>) {
  return (
    <DropdownMenu.RadioGroup aria-label={heading} value={value} onValueChange={(chosen) => onChange(chosen as T)}>
      <MenuHeading>{heading}</MenuHeading>
      {options.map((option) => (
        <DropdownMenu.RadioItem
          key={option.value}
          className="menu-item"
          value={option.value}
          onSelect={(event) => event.preventDefault()}
        >
          {option.label ?? option.value}
        </DropdownMenu.RadioItem>
      ))}
    </DropdownMenu.RadioGroup>
  );
}
