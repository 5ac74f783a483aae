import { Fragment, useEffect, useState } from 'react';
import { Button } from '../../components/button.tsx';
import { Caution } from '../../components/caution.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { readMarkdown, type Block, type Span } from './markdown.ts';

type Loading = { text: string | null; error: string | null };

/** The model's equations, as the engine's own document states them. */
export function ModelPage() {
  const [attempt, setAttempt] = useState(0);
  const { text, error } = useModelText(attempt);
  return (
    <article className="sheet-page">
      <PageTitle page="The model" />
      {error && (
        <Notice kind="stop" action={<Button onClick={() => setAttempt(attempt + 1)}>Try again</Button>}>
          {error}
        </Notice>
      )}
      {text === null ? !error && <p className="text-ink3">Loading the model.</p> : readMarkdown(text).map(renderBlock)}
      <div className="mt-[32px]">
        <Caution />
      </div>
    </article>
  );
}

function useModelText(attempt: number): Loading {
  const [loading, setLoading] = useState<Loading>({ text: null, error: null });
  // Speaks to the server.
  useEffect(() => {
    const stop = new AbortController();
    const load = async () => {
      const response = await fetch('/model.md', { signal: stop.signal });
      if (!response.ok) throw new Error(`the server answered ${response.status}`);
      setLoading({ text: await response.text(), error: null });
    };
    load().catch((error: Error) => {
      if (error.name !== 'AbortError')
        setLoading({ text: null, error: `The model could not be loaded: ${error.message}.` });
    });
    return () => stop.abort();
  }, [attempt]);
  return loading;
}

function renderBlock(block: Block, index: number, blocks: readonly Block[]) {
  switch (block.kind) {
    case 'heading': {
      const Heading = `h${Math.min(block.level, 4)}` as 'h1' | 'h2' | 'h3' | 'h4';
      return (
        <Heading key={index} id={block.anchor}>
          {renderSpans(block.spans)}
        </Heading>
      );
    }
    case 'paragraph':
      return <p key={index}>{renderSpans(block.spans)}</p>;
    case 'list': {
      const List = block.numbered ? 'ol' : 'ul';
      return (
        <List key={index}>
          {block.items.map((item, i) => (
            <li key={i}>{renderSpans(item)}</li>
          ))}
        </List>
      );
    }
    case 'code':
      return (
        <pre key={index} tabIndex={0}>
          {block.text}
        </pre>
      );
    case 'table':
      return (
        <div
          key={index}
          className="sheet-table"
          role="region"
          aria-label={`Table ${numberOfTable(blocks, index)}`}
          tabIndex={0}
        >
          <table>
            <thead>
              <tr>
                {block.head.map((cell, i) => (
                  <th key={i} scope="col">
                    {renderSpans(cell)}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody>
              {block.rows.map((row, i) => (
                <tr key={i}>
                  {row.map((cell, k) => (
                    <td key={k}>{renderSpans(cell)}</td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      );
  }
}

/** Regions are told apart by their names. */
const numberOfTable = (blocks: readonly Block[], index: number) =>
  blocks.slice(0, index + 1).filter(({ kind }) => kind === 'table').length;

function renderSpans(spans: readonly Span[]) {
  return spans.map((span, i) => {
    const { kind, text } = span;
    if (span.kind === 'link')
      return (
        <a key={i} href={`#${span.anchor}`}>
          {text}
        </a>
      );
    if (kind === 'code') return <code key={i}>{text}</code>;
    if (kind === 'bold') return <b key={i}>{text}</b>;
    return <Fragment key={i}>{text}</Fragment>;
  });
}
