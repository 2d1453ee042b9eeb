import { useFormContext, useWatch } from 'react-hook-form';
import { NoticeKind, type NoticeListResponse, type ScaleVersion } from '#shared/contracts/notices.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField, Textarea, TextField } from '#src/components/ui/text-field.tsx';
import { errorAt } from '#src/lib/form.ts';
import type { NoticeEntry } from '../notice-form.ts';

interface NoticeFieldsProps {
  publishesFor: NoticeListResponse['publishesFor'];
  scaleVersions: readonly ScaleVersion[];
  notices: NoticeListResponse['notices'];
}

/** What the notice is called, which scale versions it joins, and from when. */
export function NoticeFields({ publishesFor, scaleVersions, notices }: NoticeFieldsProps) {
  const { register, control, formState } = useFormContext<NoticeEntry>();
  const issuerId = useWatch({ control, name: 'issuerId' });
  const error = (name: keyof NoticeEntry) => errorAt(formState.errors, name);
  const standing = notices.filter(({ issuer, replacedBy }) => issuer.id === issuerId && !replacedBy);
  return (
    <>
      <Section title="The notice">
        <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
          <SelectField
            label="Published by"
            choices={publishesFor.map(({ id, name }) => ({ value: id, label: name }))}
            {...register('issuerId')}
            error={error('issuerId')}
          />
          <TextField
            label="Number"
            isMono
            autoComplete="off"
            {...register('number')}
            error={error('number')}
          />
          <SelectField
            label="Kind"
            choices={NoticeKind.options.map((kind) => ({ value: kind, label: kind }))}
            {...register('kind')}
            error={error('kind')}
          />
          <TextField
            label="Title"
            autoComplete="off"
            className="sm:col-span-3"
            {...register('title')}
            error={error('title')}
          />
          <Textarea
            label="Why it is published"
            className="sm:col-span-3"
            {...register('reason')}
            error={error('reason')}
          />
        </div>
      </Section>
      <Section title="From when">
        <div className="flex flex-wrap gap-x-4 gap-y-3">
          <DateField label="Takes effect on" {...register('effectiveOn')} error={error('effectiveOn')} />
          <DateField
            label="Made known on"
            hint="Today, or earlier for a notice of the past"
            {...register('madeKnownOn')}
            error={error('madeKnownOn')}
          />
          <SelectField
            label="Replaces"
            isOptional
            placeholder="no earlier notice"
            choices={standing.map(({ id, number, title }) => ({ value: id, label: `${number}, ${title}` }))}
            {...register('replacesId')}
            error={error('replacesId')}
          />
          <TextField
            label="From where on it matters"
            isOptional
            autoComplete="off"
            className="min-w-64 flex-1"
            {...register('threshold')}
            error={error('threshold')}
          />
        </div>
        <BackDated />
      </Section>
      <Scales scaleVersions={scaleVersions} />
    </>
  );
}

function BackDated() {
  const { control } = useFormContext<NoticeEntry>();
  const [effectiveOn, madeKnownOn] = useWatch({ control, name: ['effectiveOn', 'madeKnownOn'] });
  if (effectiveOn === '' || madeKnownOn === '' || effectiveOn >= madeKnownOn) return null;
  return (
    <Notice tone="caution" role="status">
      It takes effect before it was made known: it is published as back-dated. What was weighed in between
      stays sound in its conduct, and is questioned today.
    </Notice>
  );
}

function Scales({ scaleVersions }: { scaleVersions: readonly ScaleVersion[] }) {
  const { register, control, formState } = useFormContext<NoticeEntry>();
  const leadsTo = useWatch({ control, name: 'leadsTo' });
  const error = (name: keyof NoticeEntry) => errorAt(formState.errors, name);
  const choices = scaleVersions.map(({ id, name }) => ({ value: id, label: name }));
  return (
    <Section title="Scale version">
      <div className="grid gap-x-4 gap-y-3 sm:grid-cols-2">
        <SelectField
          label="Values stand on"
          placeholder="Choose a scale version"
          choices={choices}
          {...register('fromScaleId')}
          error={error('fromScaleId')}
        />
        <SelectField
          label="Afterwards they stand on"
          choices={[
            { value: 'same', label: 'the same' },
            { value: 'other', label: 'another that is in the register' },
            { value: 'new', label: 'a new one, made with this notice' },
          ]}
          {...register('leadsTo')}
          error={error('leadsTo')}
        />
        {leadsTo === 'other' && (
          <SelectField
            label="Which"
            placeholder="Choose a scale version"
            choices={choices}
            className="sm:col-start-2"
            {...register('toScaleId')}
            error={error('toScaleId')}
          />
        )}
        {leadsTo === 'new' && (
          <>
            <TextField
              label="Its name"
              autoComplete="off"
              {...register('newName')}
              error={error('newName')}
            />
            <TextField
              label="What it rests on"
              autoComplete="off"
              {...register('newBasis')}
              error={error('newBasis')}
            />
          </>
        )}
      </div>
    </Section>
  );
}
