import { PageTitle } from '../../components/page-title.tsx';

export function SessionDeskPage() {
  return (
    <section className="p-[24px]">
      <PageTitle page="Session desk">Session desk</PageTitle>
    </section>
  );
}
