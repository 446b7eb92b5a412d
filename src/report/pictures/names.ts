// The names of pictures, for options and help, apart from what draws them.

export const pictureNames = ['null', 'mosaic', 'strata'] as const;
export type PictureName = (typeof pictureNames)[number];
