import { html } from '../../core/html.ts';
import { cardByChoice, cardByNumber, inFours, TEST_CARDS, type TestCard } from '../cards.ts';

/** What was typed, to be shown again. */
export interface CardFields {
  choice: string;
  number: string;
}

export const readCardFields = (fields: URLSearchParams): CardFields => ({
  choice: fields.get('card') ?? '',
  number: fields.get('number')?.trim() ?? '',
});

/** The card that was chosen or typed; a typed number goes before a choice. */
export function chosenCard({ choice, number }: CardFields): TestCard | { problem: string } {
  if (number) {
    return (
      cardByNumber(number) ?? { problem: 'This number is not one of the test cards. They are listed below.' }
    );
  }
  return cardByChoice(choice) ?? { problem: 'Choose a card, or type one of the test numbers.' };
}

export const cardFields = ({ choice, number }: CardFields) => html`
  <fieldset>
    <legend>Test card</legend>
    ${TEST_CARDS.map(
      (card) =>
        html`<label class="choice">
          <input type="radio" name="card" value="${card.choice}" ${card.choice === choice && html`checked`} />
          <span>${card.label}<small>${inFours(card.number)}</small></span>
        </label>`,
    )}
  </fieldset>
  <label class="field" for="number">
    Or type a number
    <small>One of the four above. Real cards are not taken here.</small>
  </label>
  <input type="text" id="number" name="number" inputmode="numeric" autocomplete="off" value="${number}" />
`;
