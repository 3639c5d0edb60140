import { Code } from '@/components/ui/code';
import { Hash } from '@/components/ui/hash';
import { Mark } from '@/components/ui/mark';
import type { HalfSheet as Sheet } from '@/lib/pour/loaders';

function Foot({ sheet }: { sheet: Sheet }) {
  return <footer><span>Shown {sheet.printedAt}, in the audit log</span><span>Commitment <Hash hex={sheet.commitment} /></span></footer>;
}

function Head({ sheet, part }: { sheet: Sheet; part: string }) {
  return (
    <header>
      <div className="row" style={{ gap: 14 }}><Mark size={40} /><h1>{part}</h1></div>
      <div className="right"><b>{sheet.title}</b><br />{sheet.serving}</div>
    </header>
  );
}

/** Step one: barrel to letter, and nothing of codes. */
function Letters({ sheet }: { sheet: Sheet }) {
  return (
    <article className="sheet">
      <Head sheet={sheet} part="First step: letters" />
      <p style={{ padding: '10px 0 12px' }}><b>For {sheet.person} alone.</b> Fill each sample into a clean bottle marked with its letter only. Then take this paper away and tell nobody; the bottles go to the person with the codes. You don’t know the codes, so you may taste.</p>
      <div className="bottles">
        {sheet.letters.map((bottle) => (
          <div key={bottle.letter} className="bottle">
            <span className="code code-l">{bottle.letter}</span>
            <p><b>{bottle.label}</b><br />{bottle.volumeMl} mL</p>
            <span className="box" />
          </div>
        ))}
      </div>
      <Foot sheet={sheet} />
    </article>
  );
}

/** Step two: letter to code, and nothing of barrels. */
function Codes({ sheet }: { sheet: Sheet }) {
  return (
    <>
      {sheet.codes.map(({ block, bottles, rows }, index) => (
        <article key={block} className={`sheet ${index > 0 ? 'page-break' : ''}`}>
          <Head sheet={sheet} part={`Second step: codes, flight ${block}`} />
          <p style={{ padding: '10px 0 12px' }}><b>For {sheet.person} alone.</b> Cover each letter with its code, or pour into a bottle that bears the code only. Above the cut letters are named: that part never enters the tasting room. You don’t know what the letters are, so you may taste.</p>
          <div className="bottles">
            {bottles.map((bottle) => (
              <div key={bottle.code} className="bottle">
                <Code code={bottle.code} size="l" />
                <p>Letter <b className="text-20">{bottle.letter}</b></p>
                <span className="box" />
              </div>
            ))}
          </div>
          <div className="cut"><span>cut here; below, nothing is named</span></div>
          <h2>Set the glasses</h2>
          <table className="pour">
            <thead><tr><th scope="col">Seat</th>{rows[0]!.codes.map((_, place) => <th key={place} scope="col">{place + 1}</th>)}<th scope="col">Set</th></tr></thead>
            <tbody>
              {rows.map((row) => (
                <tr key={row.seat}>
                  <th scope="row">{row.seat}</th>
                  {row.codes.map((code) => <td key={code}><Code code={code} size="m" /></td>)}
                  <td><span className="box" /></td>
                </tr>
              ))}
            </tbody>
          </table>
          <Foot sheet={sheet} />
        </article>
      ))}
    </>
  );
}

/** The paper of one of the two people, who between them know the key and each alone do not. */
export const HalfSheet = ({ sheet }: { sheet: Sheet }) => (sheet.step === 'letters' ? <Letters sheet={sheet} /> : <Codes sheet={sheet} />);
