import { type ReactNode, useEffect, useRef } from 'react';

interface Props {
  title: string;
  open: boolean;
  onClose: () => void;
  children: ReactNode;
}

/** A modal on the browser's own dialog: focus stays inside, Escape closes. */
export const Dialog = ({ title, open, onClose, children }: Props) => {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    if (open && !dialog.current?.open) dialog.current?.showModal();
    if (!open && dialog.current?.open) dialog.current.close();
  }, [open]);
  return (
    <dialog
      ref={dialog}
      onClose={onClose}
      aria-label={title}
      className="m-auto max-h-[90dvh] w-[min(40rem,calc(100vw-2rem))] overflow-y-auto rounded-2xl border border-(--line) bg-(--raised) p-5 text-(--text) backdrop:bg-black/60"
    >
      {open && (
        <>
          <div className="mb-4 flex items-center justify-between gap-4">
            <h2 className="text-xl font-bold">{title}</h2>
            <button
              type="button"
              onClick={onClose}
              aria-label="Close"
              className="h-11 w-11 rounded-lg text-xl hover:bg-(--raised-2)"
            >
              ✕
            </button>
          </div>
          {children}
        </>
      )}
    </dialog>
  );
};
