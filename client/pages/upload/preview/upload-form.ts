import type { useCheckedForm } from '../../../forms/use-checked-form.ts';
import type { AcceptForm, CheckedForm } from '../accept-form.ts';

/** The form of a file that was read, as its parts take it. */
export type UploadForm = ReturnType<typeof useCheckedForm<AcceptForm, CheckedForm>>;
