export interface FileButtonProps {
  readonly label: string;
  readonly id?: string;
  readonly accept?: string;
  readonly multiple?: boolean;
  readonly onFiles: (files: readonly File[]) => void;
}

/** Chooses files. Looks and speaks like the other buttons, where the browser's own would speak its own language. */
export function FileButton({ label, id, accept, multiple = false, onFiles }: FileButtonProps) {
  return (
    <label className="control relative inline-flex cursor-pointer items-center justify-center rounded border border-line-strong bg-raised px-4 py-1 font-semibold hover:border-accent hover:bg-accent-wash has-[:focus-visible]:outline-3 has-[:focus-visible]:outline-offset-2 has-[:focus-visible]:outline-focus">
      {label}
      <input
        id={id}
        type="file"
        accept={accept}
        multiple={multiple}
        className="sr-only"
        onChange={(event) => {
          const files = [...(event.target.files ?? [])];
          // The same file, corrected, can be chosen again.
          event.target.value = '';
          if (files.length > 0) onFiles(files);
        }}
      />
    </label>
  );
}
