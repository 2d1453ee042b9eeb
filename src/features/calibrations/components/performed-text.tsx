import { DateText } from '#src/components/ui/date-text.tsx';

interface PerformedTextProps {
  performedBegin: string;
  performedEnd: string;
  datePrecision: 'day' | 'month' | 'year';
}

/** When a calibration was performed, to the precision with which that is known. */
export function PerformedText({ performedBegin, performedEnd, datePrecision }: PerformedTextProps) {
  const length = { day: 10, month: 7, year: 4 }[datePrecision];
  const [begin, end] = [performedBegin.slice(0, length), performedEnd.slice(0, length)];
  return (
    <>
      {begin !== end && (
        <>
          <DateText value={begin} /> to{' '}
        </>
      )}
      <DateText value={end} />
    </>
  );
}
