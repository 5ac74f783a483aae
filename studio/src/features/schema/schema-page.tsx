import { quantities, type Quantity } from '@voltiplano/engine';
import { Button } from '../../components/button.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { quantityParts, rangeInWords, usualInWords } from './quantity-table.ts';

/** Every numeric input of a study file, from the table that the engine itself checks against. */
export function SchemaPage() {
  return (
    <article className="sheet-page">
      <PageTitle page="Schema">The study file</PageTitle>
      <p>
        A study is one JSON file. The desk saves and opens it, the command line runs it, and both refuse the same
        mistakes with the same words. Keys not listed in the schema are an error; inputs with a default may be left out.
      </p>
      <p>
        <Button asChild>
          <a href="/study.schema.json" download>
            Save the JSON Schema
          </a>
        </Button>
      </p>
      {quantityParts(quantities).map(({ part, rows }) => (
        <section key={part} aria-labelledby={`part-${part}`}>
          <h2 id={`part-${part}`}>{part}</h2>
          <div className="sheet-table" role="region" aria-label={`Inputs of ${part}`} tabIndex={0}>
            <table>
              <thead>
                <tr>
                  <th scope="col">Key</th>
                  <th scope="col">What it is</th>
                  <th scope="col">Unit</th>
                  <th scope="col">Allowed</th>
                  <th scope="col">Usual</th>
                </tr>
              </thead>
              <tbody>
                {rows.map(({ path, quantity }) => (
                  <QuantityRow key={path} path={path} quantity={quantity} />
                ))}
              </tbody>
            </table>
          </div>
        </section>
      ))}
    </article>
  );
}

function QuantityRow({ path, quantity }: { path: string; quantity: Quantity }) {
  return (
    <tr>
      <th scope="row" className="num">
        {path}
      </th>
      <td>{quantity.what}</td>
      <td>{quantity.unit}</td>
      <td className="num">{rangeInWords(quantity)}</td>
      <td className="num">{usualInWords(quantity)}</td>
    </tr>
  );
}
