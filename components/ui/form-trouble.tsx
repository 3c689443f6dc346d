import { Notice } from './notice';

/** A refusal of the server that belongs to no single field; stands above the form's button. */
export function FormTrouble({ message }: { message?: string }) {
  return message ? <Notice tone="high" title={message} /> : null;
}
