'use client';

import { Camera } from 'lucide-react';
import { useEffect, useId, useMemo, useState } from 'react';
import { v7 as uuidv7 } from 'uuid';
import type { PhotoInput } from '@/lib/api/site';
import { smallerPicture } from '@/lib/client/smaller-picture';
import type { Commissioning } from '../commissioning-context';

interface PhotosProps {
  commissioning: Commissioning;
  subject: PhotoInput['subject'];
  subjectId: string;
  tag: string;
}

/** Photos of a station, check or snag, and the way to take another; what is not sent yet is shown from the device. */
export function Photos({ commissioning, subject, subjectId, tag }: PhotosProps) {
  const { site, outbox, outboxState, loop, mayRecord } = commissioning;
  const id = useId();
  const [problem, setProblem] = useState<string | null>(null);
  const sent = site.photos.filter((photo) => photo.subject === subject && photo.subjectId === subjectId);
  const waiting = outboxState.entries.flatMap(({ content }) =>
    content.kind === 'photo' && content.body.subject === subject && content.body.subjectId === subjectId ? [content] : [],
  );
  const take = async (file: File) => {
    const picture = await smallerPicture(file);
    if (!picture) return setProblem('This file is not a picture that this device can read.');
    setProblem(null);
    await outbox.keep(loop.id, tag, {
      kind: 'photo',
      body: { id: uuidv7(), subject, subjectId, takenAt: new Date().toISOString() },
      picture,
    });
    void outbox.send();
  };
  if (!mayRecord && sent.length === 0) return null;
  return (
    <div className="flex flex-wrap items-center gap-2">
      {sent.map((photo) => (
        <a key={photo.id} href={`/api/loops/${loop.id}/photos/${photo.id}`} target="_blank" rel="noreferrer">
          <picture>
            <img
              src={`/api/loops/${loop.id}/photos/${photo.id}`}
              alt={`Photo of ${tag} by ${photo.takenBy}`}
              loading="lazy"
              className="bg-well size-16 rounded border object-cover"
            />
          </picture>
        </a>
      ))}
      {waiting.map(({ body, picture }) => (
        <KeptPicture key={body.id} picture={picture} alt={`Photo of ${tag}, on this tablet only`} />
      ))}
      {mayRecord && (
        <>
          <label
            htmlFor={id}
            className="text-petrol hover:bg-well has-focus-visible:outline-petrol inline-flex h-12 cursor-pointer items-center gap-2 rounded px-3 font-semibold has-focus-visible:outline-2"
          >
            <Camera size={20} aria-hidden /> Photo
            <input
              id={id}
              type="file"
              accept="image/*"
              className="sr-only"
              onChange={({ target }) => {
                const [file] = target.files ?? [];
                if (file) void take(file);
                target.value = '';
              }}
            />
          </label>
          {problem && (
            <span role="alert" className="text-high text-sm">
              ▴ {problem}
            </span>
          )}
        </>
      )}
    </div>
  );
}

function KeptPicture({ picture, alt }: { picture: Blob; alt: string }) {
  const url = useMemo(() => URL.createObjectURL(picture), [picture]);
  useEffect(() => () => URL.revokeObjectURL(url), [url]);
  return (
    <picture>
      <img src={url} alt={alt} className="border-brass size-16 rounded border-2 border-dashed object-cover" />
    </picture>
  );
}
