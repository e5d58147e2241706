import { useQuery } from '@tanstack/react-query';
import { campaignsQuery } from '#src/lib/campaigns.ts';
import { Field } from './field.tsx';
import { Select } from './select.tsx';

interface CampaignPickerProps {
  /** null: none. */
  value: string | null;
  onChange: (campaignId: string | null) => void;
  disabled?: boolean;
}

/** Which campaign a case belongs to: only those one is a member of can be chosen. */
export function CampaignPicker({ value, onChange, disabled = false }: CampaignPickerProps) {
  const { data, error } = useQuery(campaignsQuery);
  const open = (data ?? []).filter((campaign) => campaign.member || campaign.id === value);
  return (
    <Field
      label="Campaign"
      hint="Its members can read and edit the case. Without one, you and the lab managers can."
      error={error ? 'The campaigns could not be loaded; the case can be saved without one.' : null}
    >
      {(control) => (
        <Select
          {...control}
          value={value ?? ''}
          disabled={disabled}
          choices={[
            { value: '', label: 'none' },
            ...open.map(({ id, name }) => ({ value: id, label: name })),
          ]}
          onChange={(id) => onChange(id === '' ? null : id)}
        />
      )}
    </Field>
  );
}
