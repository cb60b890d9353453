import { useRef, useState } from 'react';
import type { ErrorReply } from '#contracts/errors';
import { Fault } from './ui/Fault.tsx';
import { RailButton } from './ui/RailButton.tsx';

interface Props {
  photoId: string | null;
  onPhoto: (id: string | null) => void;
  error?: string | undefined;
}

const MAX_BYTES = 12 * 1024 * 1024;
const LOST = 'The line dropped. The picture was not sent; choose it again when the line is back.';

/** Sends a picture as soon as it is chosen, with the share sent and a way to stop. */
export function PhotoField({ photoId, onPhoto, error }: Props) {
  const [share, setShare] = useState<number | null>(null);
  const [name, setName] = useState('');
  const [fault, setFault] = useState('');
  const request = useRef<XMLHttpRequest | null>(null);
  const shown = fault || error;

  function send(file: File) {
    setFault('');
    setName(file.name);
    if (file.size > MAX_BYTES) return setFault('That picture is larger than 12 MB. Send a smaller one.');
    // fetch() cannot tell how much has gone up.
    const sending = new XMLHttpRequest();
    request.current = sending;
    sending.upload.onprogress = (event) => setShare(event.total > 0 ? event.loaded / event.total : 0);
    sending.onerror = () => finish(LOST);
    sending.onabort = () => finish('');
    sending.onload = () => {
      const reply = JSON.parse(sending.responseText || '{}') as { id?: string } & Partial<ErrorReply>;
      if (sending.status === 201 && reply.id) onPhoto(reply.id);
      finish(sending.status === 201 ? '' : (reply.error?.message ?? LOST));
    };
    sending.open('POST', '/api/photos');
    sending.setRequestHeader('content-type', file.type || 'application/octet-stream');
    sending.send(file);
    setShare(0);
  }

  function finish(words: string) {
    setShare(null);
    setFault(words);
  }

  return (
    <div className={shown ? 'field faulty' : 'field'}>
      <label htmlFor="photo">A picture, if it helps</label>
      <span className="hint" id="photo-hint">
        JPEG, PNG or WebP up to 12 MB. Place and camera are removed before anybody sees it.
      </span>
      {shown && <Fault id="photo-fault">{shown}</Fault>}
      {photoId ? (
        <p className="cluster">
          <span role="status">{name || 'A picture'} goes with it.</span>
          <RailButton onClick={() => onPhoto(null)}>Take it out</RailButton>
        </p>
      ) : share === null ? (
        <input
          id="photo"
          className="box"
          type="file"
          accept="image/jpeg,image/png,image/webp,image/avif"
          aria-describedby={shown ? 'photo-hint photo-fault' : 'photo-hint'}
          onChange={(event) => event.target.files?.[0] && send(event.target.files[0])}
        />
      ) : (
        <div>
          <progress className="paintrail" max={1} value={share} aria-label={`Sending ${name}`} />
          <p className="cluster">
            <span role="status">
              {name}, {Math.round(share * 100)} %
            </span>
            <RailButton onClick={() => request.current?.abort()}>Stop sending</RailButton>
          </p>
        </div>
      )}
    </div>
  );
}
