import { ButtonLink } from './button.tsx';
import { PageTitle } from './page-title.tsx';

/** No such address; also what a case looks like to those who may not read it. */
export function NotFound() {
  return (
    <div className="flex max-w-prose flex-col items-start gap-4 py-6">
      <PageTitle title="Not found" />
      <p>
        There is nothing at this address, or it is not open to you. A case can be read by its owner,
        the members of its campaign and the lab managers; ask its owner to place it in a campaign of
        yours.
      </p>
      <ButtonLink to="/">Go to the Desk</ButtonLink>
    </div>
  );
}
