/** Ernest, University of Delaware Extension, with Mid-Atlantic table A-4. */
export const DELAWARE = 'University of Delaware Extension (Ernest; Mid-Atlantic table A-4)';
/** Utah State University Extension, vegetable guide. */
export const UTAH = 'Utah State University Extension, vegetable guide';
/** Utah State University Extension, page on tomatoes and peppers. */
export const UTAH_TOMATO_PEPPER = 'Utah State University Extension, tomatoes and peppers';
/** Purdue University, vegetable crops hotline. */
export const PURDUE = 'Purdue University, vegetable crops hotline';
/** Cornell, New York State integrated pest management, vegetable practices. */
export const CORNELL = 'Cornell NYS IPM, vegetable practices, table 9.1.1';
