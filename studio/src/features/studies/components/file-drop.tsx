import { useState, type DragEvent, type ReactNode } from 'react';

type Props = {
  className: string;
  /** Takes no files now. */
  isOff?: boolean;
  onFiles: (files: File[]) => void;
  children: ReactNode;
};

/** A part of the page that files can be dropped on; a dashed edge says so while they are held over it. */
export function FileDrop({ className, isOff = false, onFiles, children }: Props) {
  const [isOver, setOver] = useState(false);
  const holdsFiles = (event: DragEvent) => !isOff && event.dataTransfer.types.includes('Files');
  return (
    <div
      className={isOver ? `${className} dropping` : className}
      onDragOver={(event) => {
        if (!holdsFiles(event)) return;
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={(event) => {
        if (!event.currentTarget.contains(event.relatedTarget as Node | null)) setOver(false);
      }}
      onDrop={(event) => {
        if (!holdsFiles(event)) return;
        event.preventDefault();
        setOver(false);
        onFiles([...event.dataTransfer.files]);
      }}
    >
      {children}
    </div>
  );
}
