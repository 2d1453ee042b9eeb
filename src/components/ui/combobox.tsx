import { useEffect, useId, useRef, useState, type KeyboardEvent, type Ref } from 'react';
import { CONTROL_CLASS, Field, type FieldProps } from './field.tsx';

/** One thing that can be chosen. */
export interface ComboboxOption {
  id: string;
  label: string;
  /** Said after the label: holder, date, value. */
  detail?: string;
}

interface ComboboxProps<Option extends ComboboxOption> extends FieldProps {
  /** What is chosen; null when nothing is. */
  value: Option | null;
  onChange: (chosen: Option | null) => void;
  /** Answers what was typed; a search that was overtaken is aborted. */
  search: (text: string, signal: AbortSignal) => Promise<readonly Option[]>;
  /** Said when nothing is found. @default 'Nothing found' */
  emptyText?: string;
  placeholder?: string;
  onBlur?: () => void;
  ref?: Ref<HTMLInputElement>;
}

const PAUSE_MS = 180;

/** A box that searches as one types and offers what it finds. Arrow keys move, Enter chooses, Escape closes. */
export function Combobox<Option extends ComboboxOption>(props: ComboboxProps<Option>) {
  const { label, hint, error, isOptional, isLabelHidden, className } = props;
  const { value, onChange, search, emptyText = 'Nothing found', placeholder, onBlur, ref } = props;
  const listId = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [active, setActive] = useState(0);
  const found = useFound(typed, search);
  const isOpen = typed !== null && typed.trim() !== '';
  const options = found.options;

  function choose(option: Option | undefined): void {
    if (!option) return;
    onChange(option);
    setTyped(null);
  }

  function onKeyDown(event: KeyboardEvent): void {
    if (!isOpen) return;
    if (event.key === 'Escape') {
      event.preventDefault();
      setTyped(null);
    } else if (event.key === 'Enter') {
      event.preventDefault();
      choose(options[active]);
    } else if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault();
      const step = event.key === 'ArrowDown' ? 1 : -1;
      if (options.length > 0) setActive((active + step + options.length) % options.length);
    }
  }

  return (
    <Field {...{ label, hint, error, isOptional, isLabelHidden, className }}>
      {(wiring) => (
        <div className="relative">
          <input
            {...wiring}
            ref={ref}
            type="text"
            role="combobox"
            autoComplete="off"
            spellCheck={false}
            placeholder={placeholder}
            aria-expanded={isOpen}
            aria-controls={listId}
            aria-autocomplete="list"
            aria-activedescendant={isOpen && options[active] ? `${listId}-${active}` : undefined}
            value={typed ?? value?.label ?? ''}
            onChange={(event) => {
              setTyped(event.target.value);
              setActive(0);
              if (event.target.value === '') onChange(null);
            }}
            onKeyDown={onKeyDown}
            onBlur={() => {
              setTyped(null);
              onBlur?.();
            }}
            className={CONTROL_CLASS}
          />
          <ul
            id={listId}
            role="listbox"
            aria-label="Found"
            hidden={!isOpen}
            className="absolute top-full left-0 z-10 max-h-80 w-max max-w-[min(30rem,90vw)] min-w-full overflow-auto border border-ink bg-raised"
          >
            {options.map((option, index) => (
              <li
                key={option.id}
                id={`${listId}-${index}`}
                role="option"
                aria-selected={index === active}
                // The press is stopped so that the box keeps the focus until the click has chosen.
                onMouseDown={(event) => event.preventDefault()}
                onClick={() => choose(option)}
                onMouseEnter={() => setActive(index)}
                className="cursor-pointer border-b border-rule px-2 py-1.5 last:border-0 aria-selected:bg-ink aria-selected:text-paper"
              >
                {option.label}
                {option.detail && <span className="ml-2 text-sm opacity-85">{option.detail}</span>}
              </li>
            ))}
            {options.length === 0 && (
              <li className="px-2 py-1.5 text-ink-2">
                {found.isSearching
                  ? 'Searching…'
                  : found.hasFailed
                    ? 'The search failed; type again.'
                    : emptyText}
              </li>
            )}
          </ul>
          <span role="status" className="sr-only">
            {isOpen && !found.isSearching ? `${options.length} found` : ''}
          </span>
        </div>
      )}
    </Field>
  );
}

interface Found<Option> {
  options: readonly Option[];
  isSearching: boolean;
  hasFailed: boolean;
}

/** Searches after a short pause in the typing; the newest question is the only one answered. */
function useFound<Option>(
  typed: string | null,
  search: ComboboxProps<Option & ComboboxOption>['search'],
): Found<Option> {
  const [found, setFound] = useState<Found<Option> & { text: string }>({
    text: '',
    options: [],
    isSearching: false,
    hasFailed: false,
  });
  const latest = useRef(search);
  useEffect(() => {
    latest.current = search;
  });
  const text = typed?.trim() ?? '';
  useEffect(() => {
    if (text === '') return undefined;
    const stop = new AbortController();
    const timer = setTimeout(() => {
      latest.current(text, stop.signal).then(
        (options) => {
          if (!stop.signal.aborted) setFound({ text, options, isSearching: false, hasFailed: false });
        },
        () => {
          if (!stop.signal.aborted) setFound({ text, options: [], isSearching: false, hasFailed: true });
        },
      );
    }, PAUSE_MS);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [text]);
  return found.text === text ? found : { options: [], isSearching: text !== '', hasFailed: false };
}
