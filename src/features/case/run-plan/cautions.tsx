import { Notice } from '#src/components/notice.tsx';

/** What a plan of counts is not, said on every page that sizes a run. */
export function RunCautions() {
  return (
    <Notice tone="info" title="For planning counts only">
      <p className="max-w-prose text-sm">
        These figures are an estimate, not an authorisation: nothing here may be used for shielding,
        dose, interlock or activation decisions. Local radiation-protection rules and the licensed
        officer decide. Ask before the run: does the target or its holder become active; is there
        high voltage, vacuum, a cryogen or a toxic material; who may enter, and when.
      </p>
    </Notice>
  );
}
