'use client';
import dynamic from 'next/dynamic';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { nodeSettingsText, tokenUse } from '@/lib/wording/wiring-parts';

/** The encoder is wanted here only. */
const QrCode = dynamic(() => import('@/components/ui/qr-code').then((module) => module.QrCode));

/** A node's token, shown this once: only its hash is kept. */
export function TokenShown({
  nodeKey,
  kind,
  token,
  note,
  onClose,
}: {
  nodeKey: string;
  kind: string;
  token: string;
  note?: string;
  onClose: () => void;
}) {
  const [said, setSaid] = useState('');
  const copy = () =>
    navigator.clipboard.writeText(token).then(
      () => setSaid('Copied.'),
      // a page on plain http may not write to the clipboard
      () => setSaid('This browser does not let the page copy. Select the token and copy it by hand.'),
    );
  return (
    <Dialog
      open
      as="sheet"
      title={`The token of ${nodeKey}`}
      description="It is shown this once. Put it into the node now; if it is lost, make a new one."
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      actions={
        <Button kind="primary" onClick={onClose}>
          It is in the node
        </Button>
      }
    >
      <code className="rounded-md border border-edge bg-field p-3 font-mono break-all select-all">
        {token}
      </code>
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={() => void copy()}>Copy</Button>
        <p role="status">{said}</p>
      </div>
      <div>
        <p className="font-semibold">For a camera</p>
        <p className="mb-2 text-[0.95rem] text-soft">
          Address, name and token as the node’s settings hold them. It is drawn here and goes nowhere.
        </p>
        <QrCode
          text={nodeSettingsText(nodeKey, token, window.location.origin)}
          label={`QR code of the settings of ${nodeKey}`}
        />
      </div>
      <div>
        <p className="font-semibold">Where it goes</p>
        <p className="text-[0.95rem] text-soft">
          The node sends it with every connection. Whoever has it speaks as this node, so keep it out of mails
          and photographs.
        </p>
        <pre
          tabIndex={0}
          aria-label="How the node uses it"
          className="mt-2 overflow-x-auto rounded-md bg-faint p-3 font-mono text-[0.85rem]"
        >
          {tokenUse(kind, window.location.origin).join('\n')}
        </pre>
      </div>
      {note === undefined ? null : <p>{note}</p>}
    </Dialog>
  );
}
