import type { ReactNode } from 'react';
import type { FieldValues, UseFormReturn } from 'react-hook-form';
import { Button } from '../button.tsx';
import { Notice } from '../notice.tsx';
import { type FieldOfCode, useServerErrors } from './use-server-errors.ts';

type Props<V extends FieldValues, C, T> = {
  form: UseFormReturn<V, C, T>;
  /** Sends it; what this throws is shown beside the fields it is about, or above the button. */
  send: (values: T) => Promise<unknown>;
  fieldOfCode?: FieldOfCode<V>;
  /** Word of the button, and the words while it works. */
  submit: string;
  busy: string;
  /** Whether the button is the one next step of the page. */
  go?: boolean;
  /** Few short fields and their button in one line, where there is room. */
  isRow?: boolean;
  /** Stands beside the button. */
  beside?: ReactNode;
  /** Name read aloud, where the page has several forms. */
  label?: string;
  children: ReactNode;
};

/** Fields over one button: checked before it is sent, the first wrong field focused, what was typed always kept. */
export function Form<V extends FieldValues, C, T>(props: Props<V, C, T>) {
  const { form, send, fieldOfCode, submit, busy, go = true, isRow, beside, label, children } = props;
  const { formProblem, takeProblem, clear } = useServerErrors(form, fieldOfCode);
  const { isSubmitting } = form.formState;
  const onSubmit = form.handleSubmit(async (values) => {
    clear();
    try {
      await send(values);
    } catch (error) {
      takeProblem(error);
    }
  });
  return (
    <form
      className={isRow ? 'form row' : 'form'}
      noValidate
      aria-label={label}
      onSubmit={(event) => {
        if (isSubmitting) event.preventDefault();
        else void onSubmit(event);
      }}
    >
      {children}
      {formProblem && <Notice kind="stop">{formProblem}</Notice>}
      <div className="form-actions">
        <Button type="submit" go={go} busy={isSubmitting ? busy : undefined}>
          {submit}
        </Button>
        {beside}
      </div>
    </form>
  );
}
