import type { ReactNode } from 'react';

type Props = {
  /** Name in the browser's tab, before the product's. */
  page: string;
  children?: ReactNode;
};

/** Names the page in the tab and, with children, on the page. */
export function PageTitle({ page, children }: Props) {
  return (
    <>
      <title>{`${page}: Voltiplano`}</title>
      {children && <h1>{children}</h1>}
    </>
  );
}
