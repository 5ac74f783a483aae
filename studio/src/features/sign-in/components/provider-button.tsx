import { Button } from '../../../components/button.tsx';
import { useSignInOptions } from '../api/sign-in-options.ts';

type Props = {
  /** Page to open afterwards; it reaches the server's log. */
  next: string;
  /** In a tab of its own, so that this page stays as it is. */
  isApart?: boolean;
  /** Keeps what must be known on coming back. */
  onLeave?: () => void;
};

/** The way over the company's own sign-in, where the server has one. */
export function ProviderButton({ next, isApart, onLeave }: Props) {
  const { data } = useSignInOptions();
  if (!data?.provider) return null;
  const { name, startUrl } = data.provider;
  const href = `${startUrl}?next=${encodeURIComponent(next)}`;
  return (
    <Button asChild onClick={onLeave}>
      <a href={href} {...(isApart ? { target: '_blank', rel: 'noreferrer' } : {})}>
        Sign in with {name}
      </a>
    </Button>
  );
}
