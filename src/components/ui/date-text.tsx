interface DateTextProps {
  /** ISO 8601 day or instant; an instant is shown in UTC, to the minute. */
  value: string;
  className?: string;
}

/** A day or an instant as ISO 8601 text, marked up as a time. */
export function DateText({ value, className = '' }: DateTextProps) {
  const text = value.length > 10 ? `${value.slice(0, 10)} ${value.slice(11, 16)} UTC` : value;
  return (
    <time dateTime={value} className={`whitespace-nowrap ${className}`}>
      {text}
    </time>
  );
}
