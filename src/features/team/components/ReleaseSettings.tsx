import { toast } from '#src/lib/toast.ts';
import type { TeamSettings } from '#shared/schemas/team.ts';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Select } from '#src/components/Select.tsx';
import { Switch } from '#src/components/Switch.tsx';
import { useUpdateTeam } from '../api/team.ts';

interface ReleaseSettingsProps {
  settings: TeamSettings;
  administer: boolean;
}

const REVIEW_COUNTS = ['1', '2', '3', '4', '5'].map((count) => ({ value: count, label: count }));

/** What a revision takes to be released in this team; everybody sees it, administrators change it. */
export function ReleaseSettings({ settings, administer }: ReleaseSettingsProps) {
  const update = useUpdateTeam();
  const change = (part: Partial<TeamSettings>) =>
    update.mutate({ settings: part }, { onSuccess: () => toast('Release settings changed') });
  return (
    <section className="max-w-xl space-y-4">
      <h2>Release</h2>
      {update.isError && <ErrorNote error={update.error} />}
      {administer ? (
        <>
          <Select
            label="Reviewers who have to accept"
            hint="Before a lead can approve. Nobody reviews a draft they changed themselves."
            className="max-w-72"
            value={String(settings.requiredReviews)}
            options={REVIEW_COUNTS}
            onValueChange={(count) => change({ requiredReviews: Number(count) })}
          />
          <Switch
            label="One lead may be both the only reviewer and the approver"
            checked={settings.soleReviewerMayApprove}
            onCheckedChange={(soleReviewerMayApprove) => change({ soleReviewerMayApprove })}
          />
        </>
      ) : (
        <ul className="list-disc pl-5">
          <li>
            {settings.requiredReviews === 1
              ? 'One reviewer has to accept before a lead can approve.'
              : `${settings.requiredReviews} reviewers have to accept before a lead can approve.`}
          </li>
          <li>
            One lead {settings.soleReviewerMayApprove ? 'may' : 'may not'} be both the only reviewer
            and the approver.
          </li>
        </ul>
      )}
    </section>
  );
}
