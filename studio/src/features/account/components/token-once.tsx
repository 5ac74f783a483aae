import { useState } from 'react';
import { Button } from '../../../components/button.tsx';
import { Notice } from '../../../components/notice.tsx';

type Props = { name: string; token: string; onPutAway: () => void };

/** The secret of a token, the only time it is shown. */
export function TokenOnce({ name, token, onPutAway }: Props) {
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(token);
      setCopied('yes');
    } catch {
      // The browser may refuse the clipboard, for instance without https: the text can then be taken by hand.
      setCopied('refused');
    }
  };
  return (
    <div className="mb-[24px]">
      <Notice>The token {name} is shown this once. Copy it to where your script reads it.</Notice>
      <p className="secret">
        <output className="num" aria-label={`Secret of ${name}`}>
          {token}
        </output>
      </p>
      <div className="form-actions">
        <Button go onClick={() => void copy()}>
          {copied === 'yes' ? 'Copied' : 'Copy'}
        </Button>
        <Button onClick={onPutAway}>Put away</Button>
        {copied === 'refused' && <span className="text-stop">The browser refused. Select the text and copy it.</span>}
      </div>
    </div>
  );
}
