import type { ReachMode } from '@/lib/reach';

const REACH_WORDS: Record<ReachMode, string> = {
  https: 'Phones come by https: everything works, offline too.',
  lan: 'Phones come over this network by plain http: tell people to keep the page open. Closed, a sheet can’t be opened again without signal, and screens may dim.',
  localhost: 'Only this machine can reach the address. Set APP_URL, or connect it to a network, for phones.',
};

/** How people join: QR code, link, six digits. */
export function JoinPanel({ qr, url, code, mode }: { qr: string; url: string; code: string; mode: ReachMode }) {
  return (
    <div className="row join" style={{ alignItems: 'flex-start' }}>
      {/* eslint-disable-next-line @next/next/no-img-element -- a data: picture */}
      <img className="qr" src={qr} alt={`QR code of ${url}`} width={148} height={148} />
      <div className="soft">
        Join with<br /><b>{code.slice(0, 3)} {code.slice(3)}</b><br />
        at {new URL(url).host}/j<br />
        <span className="note">{REACH_WORDS[mode]}</span>
      </div>
    </div>
  );
}
