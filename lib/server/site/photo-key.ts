/** Where a photo lies in the bucket; the organisation comes first, as in every table. */
export const photoKey = (organizationId: string, photoId: string): string => `${organizationId}/photos/${photoId}.jpg`;
