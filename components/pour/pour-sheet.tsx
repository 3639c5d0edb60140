import { Code } from '@/components/ui/code';
import { Hash } from '@/components/ui/hash';
import { Mark } from '@/components/ui/mark';
import type { PourSheet as Sheet } from '@/lib/pour/loaders';

/** One block on paper: what is in the bottles above the cut, which glass goes where below it. */
export function PourSheet({ sheet }: { sheet: Sheet }) {
  return (
    <>
      {sheet.blocks.map(({ block, rows }, index) => (
        <article key={block} className={`sheet ${index > 0 ? 'page-break' : ''}`}>
          <header>
            <div className="row" style={{ gap: 14 }}><Mark size={40} /><h1>Pour sheet</h1></div>
            <div className="right"><b>{sheet.title}, {sheet.blockWord} {block}</b><br />{sheet.serving}</div>
          </header>
          <p style={{ padding: '10px 0 12px' }}><b>For {sheet.pourer}, pourer,</b> who does not taste in this session. Above the cut the samples are named: that part never enters the tasting room.</p>
          <h2><b>1</b> {sheet.hasOwnCodes ? 'Fill the glasses, bottle by bottle' : 'Mark the bottles'}</h2>
          {sheet.hasOwnCodes ? <OwnCodeBottles sheet={sheet} block={block} /> : <Bottles sheet={sheet} block={block} />}
          <div className="cut"><span>cut here; below, nothing is named</span></div>
          <h2><b>2</b> Set the glasses</h2>
          <table className="pour">
            <thead><tr><th scope="col">Seat</th>{rows[0]!.glasses.map((_, place) => <th key={place} scope="col">{place + 1}</th>)}<th scope="col">Set</th></tr></thead>
            <tbody>
              {rows.map((row) => (
                <tr key={row.seat}>
                  <th scope="row">{row.seat}</th>
                  {row.glasses.map((glass) => <td key={glass.code}><Code code={glass.code} size="m" /></td>)}
                  <td><span className="box" /></td>
                </tr>
              ))}
            </tbody>
          </table>
          <footer><span>Shown {sheet.printedAt}, in the audit log</span><span>Commitment <Hash hex={sheet.commitment} /></span></footer>
        </article>
      ))}
    </>
  );
}

function Bottles({ sheet, block }: { sheet: Sheet; block: number }) {
  return (
    <div className="bottles">
      {sheet.bottles.filter((bottle) => bottle.block === block).map((bottle) => (
        <div key={bottle.code} className="bottle">
          <Code code={bottle.code!} size="l" />
          <p><b>{bottle.label}</b><br />{bottle.glasses} + 1 glasses, {bottle.volumeMl} mL</p>
          <span className="box" />
        </div>
      ))}
    </div>
  );
}

/** Each glass has a code of its own: the list says which of them each bottle fills. */
function OwnCodeBottles({ sheet, block }: { sheet: Sheet; block: number }) {
  const inBlock = sheet.blocks.find((candidate) => candidate.block === block)!.rows.flatMap((row) => row.glasses);
  return (
    <div className="stack">
      {sheet.bottles.map((bottle) => {
        const codes = inBlock.filter((glass) => glass.label === bottle.label).map((glass) => glass.code).sort();
        return (
          <section key={bottle.label} className="stack tight">
            <h3>{bottle.label}: {codes.length} glasses</h3>
            <p className="row wrap">{codes.map((code) => <Code key={code} code={code} size="s" />)}</p>
          </section>
        );
      })}
    </div>
  );
}
