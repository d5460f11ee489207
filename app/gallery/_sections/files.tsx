'use client';

import { useState } from 'react';
import { Button } from '@/lib/ui/actions/button';
import { DropZone } from '@/lib/ui/files/drop-zone';
import { FileButton } from '@/lib/ui/files/file-button';
import { refusedSentence } from '@/lib/ui/files/refused';

const MAX = 20 * 1024 * 1024;

export function FilesSection() {
  const [said, setSaid] = useState<string[]>([]);
  return (
    <div className="grid gap-4">
      <DropZone
        accept={{ 'application/pdf': ['.pdf'], 'text/csv': ['.csv'] }}
        maxBytes={MAX}
        overLabel="Let go to send it to North bed"
        onFiles={(files) => setSaid(files.map((file) => `${file.name} taken.`))}
        onRefused={(files) => setSaid(files.map((file) => refusedSentence(file, 'PDF files and data files', MAX)))}
      >
        {({ open }) => (
          <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
            <p className="flex-1 basis-64">
              <span className="font-semibold">Drop a laboratory report here.</span> PDF or data file, up to 20 MB,
              several at once.
            </p>
            <Button look="quiet" onClick={open}>
              Pick a file
            </Button>
          </div>
        )}
      </DropZone>
      <div>
        <FileButton
          look="quiet"
          accept=".pdf,.csv"
          multiple
          onFiles={(files) => setSaid(files.map((file) => `${file.name} taken.`))}
        >
          Pick files without a card
        </FileButton>
      </div>
      <div role="status">
        <ul>
          {said.map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
      </div>
    </div>
  );
}
