'use client';

import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';
import { useId, useState } from 'react';
import { useWords } from '@/components/i18n/words';
import { Ring } from '@/components/ui/ring';

/**
 * Takes the SHA-256 of a plan file in this browser, in plain JavaScript (the browser's own is missing
 * on plain http), and holds it beside the commitment. Nothing is sent anywhere.
 */
export function CheckForm({ commitment }: { commitment: string }) {
  const t = useWords();
  const [expected, setExpected] = useState(commitment);
  const [found, setFound] = useState<{ name: string; hex: string } | null>(null);
  const codeId = useId();
  const fileId = useId();
  const wanted = expected.replaceAll(/\s/g, '').toLowerCase();
  const take = async (file: File | undefined) => file && setFound({ name: file.name, hex: bytesToHex(sha256(new Uint8Array(await file.arrayBuffer()))) });
  return (
    <div className="stack">
      <div className="field">
        <label htmlFor={codeId}>{t('check.digits')}</label>
        <input id={codeId} className="input" value={expected} onChange={(event) => setExpected(event.target.value)} spellCheck={false} autoComplete="off" />
      </div>
      <div className="field">
        <label htmlFor={fileId}>{t('check.file')}</label>
        <input id={fileId} className="input" type="file" onChange={(event) => void take(event.target.files?.[0])} />
      </div>
      {found && (
        <div className={found.hex === wanted ? 'saved' : 'caution'} role="status">
          <p className="row"><Ring state={found.hex === wanted ? 'done' : 'waits'} /><b>{found.hex === wanted ? t('check.fits') : t('check.fitsNot')}</b></p>
          <p className="note" style={{ overflowWrap: 'anywhere' }}>{t('check.hashOf', found)}</p>
        </div>
      )}
    </div>
  );
}
