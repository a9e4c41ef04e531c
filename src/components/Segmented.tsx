interface Props<V extends string> {
  label: string;
  options: readonly { value: V; label: string }[];
  value: V;
  onChange: (value: V) => void;
  /** Height for a thumb in the dark: 60 px. */
  big?: boolean;
}

/** One of a few, all in sight. */
export const Segmented = <V extends string>({ label, options, value, onChange, big = false }: Props<V>) => (
  <fieldset className="flex min-w-0 gap-1 rounded-xl bg-(--raised-2) p-1">
    <legend className="sr-only">{label}</legend>
    {options.map((option) => (
      <button
        key={option.value}
        type="button"
        aria-pressed={option.value === value}
        onClick={() => onChange(option.value)}
        className={`min-w-0 flex-1 rounded-lg px-1 sm:px-3 sm:whitespace-nowrap text-(--quiet) aria-pressed:bg-(--raised-3) aria-pressed:font-bold aria-pressed:text-(--text) ${big ? 'min-h-15 text-lg' : 'min-h-11'}`}
      >
        {option.label}
      </button>
    ))}
  </fieldset>
);
