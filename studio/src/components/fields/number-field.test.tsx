import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, expect, test } from 'vitest';
import { NumberField } from './number-field.tsx';
import { numberText, readNumber } from './measure.ts';

afterEach(cleanup);

const help = { what: 'Most current of the station’s cable.', usual: '125 to 500 A', allowed: 'above 0 A' };

function Held({ error }: { error?: string }) {
  const [value, setValue] = useState(36);
  return (
    <>
      <NumberField
        label="Current, most"
        help={help}
        unit="A"
        text={numberText(value, 1)}
        measure={{ step: 0.5, decimals: 1 }}
        range={{ min: 0, max: 40 }}
        usual={[10, 30]}
        {...(error ? { error } : {})}
        onText={(text) => setValue(readNumber(text))}
      />
      <button onClick={() => setValue(12)}>Elsewhere</button>
    </>
  );
}

const input = () => screen.getByRole<HTMLInputElement>('textbox', { name: 'Current, most' });

test('NumberField keeps the text as it is typed and tidies it on leaving', () => {
  render(<Held />);
  fireEvent.change(input(), { target: { value: '35,' } });
  expect(input().value).toBe('35,');
  fireEvent.blur(input());
  expect(input().value).toBe('35.0');
});

test('NumberField shows a change from elsewhere at once, even while typed in', () => {
  render(<Held />);
  fireEvent.change(input(), { target: { value: '35.' } });
  fireEvent.click(screen.getByText('Elsewhere'));
  expect(input().value).toBe('12.0');
});

test('NumberField steps with arrows, ten times with Shift, and stops at what is allowed', () => {
  render(<Held />);
  fireEvent.keyDown(input(), { key: 'ArrowDown' });
  expect(input().value).toBe('35.5');
  fireEvent.keyDown(input(), { key: 'ArrowUp', shiftKey: true });
  expect(input().value).toBe('40.0');
});

test('NumberField ties the sentence to the input', () => {
  render(<Held error="Must be at most 40 A." />);
  expect(input().getAttribute('aria-invalid')).toBe('true');
  expect(document.getElementById(input().getAttribute('aria-describedby')!)?.textContent).toBe('Must be at most 40 A.');
});

test('the label opens what the quantity is', () => {
  render(<Held />);
  fireEvent.click(screen.getByRole('button', { name: 'Current, most' }));
  expect(screen.getByRole('dialog', { name: 'Current, most' }).textContent).toContain('Most current of the station');
});
