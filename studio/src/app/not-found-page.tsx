import { Link } from 'react-router-dom';
import { Button } from '../components/button.tsx';
import { PageTitle } from '../components/page-title.tsx';

export function NotFoundPage() {
  return (
    <section className="px-[24px] py-[48px] max-w-[60ch]">
      <PageTitle page="No page here">No page at this address</PageTitle>
      <p className="my-[16px] text-ink2">The link may be old, or mistyped. The desk works without an account.</p>
      <Button go asChild>
        <Link to="/try">Open the desk</Link>
      </Button>
    </section>
  );
}
