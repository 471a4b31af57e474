import { useState } from 'react';
import { Field } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { counted } from '../../lib/formats';
import type { Crib, ToolOut } from './use-crib';

const byName = new Intl.Collator('en', { numeric: true });

/** What is out by person: whom to ask before they go home. */
export function WhatEachHas({ crib }: { crib: Crib }) {
  const [typed, setTyped] = useState('');
  const tools = new Map<string, ToolOut[]>();
  for (const one of crib.out) {
    const list = tools.get(one.checkout.personId);
    if (list) list.push(one);
    else tools.set(one.checkout.personId, [one]);
  }
  if (tools.size === 0) return null;
  const wanted = typed.trim().toLowerCase();
  const people = [...tools]
    .map(([id, has]) => ({
      id,
      has,
      name: crib.nameOf(id),
      number: String(crib.people.get(id)?.number ?? ''),
    }))
    .filter(({ name, number }) => name.toLowerCase().includes(wanted) || number.startsWith(wanted))
    .sort((a, b) => byName.compare(a.name, b.name));
  return (
    <section aria-labelledby="what-each-has">
      <DimensionHead id="what-each-has" right={counted(tools.size, 'person', 'people')}>
        What each has
      </DimensionHead>
      <div className="muster-find">
        <Field
          label="name or number"
          type="search"
          autoComplete="off"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
      </div>
      <p role="status" className={people.length === 0 ? 'text-pencil' : 'sr-only'}>
        {people.length === 0 ? `${typed.trim()} has nothing from the crib.` : ''}
      </p>
      <dl className="muster-duties">
        {people.map(({ id, name, number, has }) => (
          <div key={id}>
            <dt>
              {name}, {number}
            </dt>
            <dd>
              {has.map(({ tool, late }, i) => (
                <span key={tool.id}>
                  {i > 0 && ', '}
                  {late ? <strong className="text-held">{tool.number} late</strong> : tool.number}
                </span>
              ))}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
