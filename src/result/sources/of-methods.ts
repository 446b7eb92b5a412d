// Sources of drawing, of adjusting, and of measures and their intervals, one a line:
// how it is cited | authors | title | journal, or for a book its publisher | volume | number | pages.

export const sourcesOfMethods = `
Patefield 1981 | Patefield, W. M. | Algorithm AS 159: an efficient method of generating random R x C tables with given row and column totals | Applied Statistics | 30 | 1 | 91-97
Neves & Araujo 2012 | Neves, S. and Araujo, F. | Fast and small nonlinear pseudorandom number generators for computer simulation | Parallel Processing and Applied Mathematics (PPAM 2011), Springer | 7203 | | 92-101
Phipson & Smyth 2010 | Phipson, B. and Smyth, G. K. | Permutation P-values should never be zero: calculating exact P-values when permutations are randomly drawn | Statistical Applications in Genetics and Molecular Biology | 9 | 1 | Article 39
Clopper & Pearson 1934 | Clopper, C. J. and Pearson, E. S. | The use of confidence or fiducial limits illustrated in the case of the binomial | Biometrika | 26 | 4 | 404-413
Darling & Robbins 1967 | Darling, D. A. and Robbins, H. | Confidence sequences for mean, variance, and median | Proceedings of the National Academy of Sciences | 58 | 1 | 66-68
Robbins 1970 | Robbins, H. | Statistical methods related to the law of the iterated logarithm | Annals of Mathematical Statistics | 41 | 5 | 1397-1409
Howard et al. 2021 | Howard, S. R. and Ramdas, A. and McAuliffe, J. and Sekhon, J. | Time-uniform, nonparametric, nonasymptotic confidence sequences | Annals of Statistics | 49 | 2 | 1055-1080
Besag & Clifford 1989 | Besag, J. and Clifford, P. | Generalized Monte Carlo significance tests | Biometrika | 76 | 4 | 633-642
Besag & Clifford 1991 | Besag, J. and Clifford, P. | Sequential Monte Carlo p-values | Biometrika | 78 | 2 | 301-304
Metropolis et al. 1953 | Metropolis, N. and Rosenbluth, A. W. and Rosenbluth, M. N. and Teller, A. H. and Teller, E. | Equation of state calculations by fast computing machines | Journal of Chemical Physics | 21 | 6 | 1087-1092
Aoki & Takemura 2005 | Aoki, S. and Takemura, A. | Markov chain Monte Carlo exact tests for incomplete two-way contingency tables | Journal of Statistical Computation and Simulation | 75 | 10 | 787-812
Deming & Stephan 1940 | Deming, W. E. and Stephan, F. F. | On a least squares adjustment of a sampled frequency table when the expected marginal totals are known | Annals of Mathematical Statistics | 11 | 4 | 427-444
Efron 1979 | Efron, B. | Bootstrap methods: another look at the jackknife | Annals of Statistics | 7 | 1 | 1-26
Davison & Hinkley 1997 | Davison, A. C. and Hinkley, D. V. | Bootstrap Methods and their Application | book: Cambridge University Press, Cambridge | | |
Holm 1979 | Holm, S. | A simple sequentially rejective multiple test procedure | Scandinavian Journal of Statistics | 6 | 2 | 65-70
Dunn 1961 | Dunn, O. J. | Multiple comparisons among means | Journal of the American Statistical Association | 56 | 293 | 52-64
Hochberg 1988 | Hochberg, Y. | A sharper Bonferroni procedure for multiple tests of significance | Biometrika | 75 | 4 | 800-802
Gilbert 2005 | Gilbert, P. B. | A modified false discovery rate multiple-comparisons procedure for discrete data, applied to human immunodeficiency virus genetics | Applied Statistics | 54 | 1 | 143-158
Tarone 1990 | Tarone, R. E. | A modified Bonferroni method for discrete data | Biometrics | 46 | 2 | 515-522
Wright 1992 | Wright, S. P. | Adjusted P-values for simultaneous inference | Biometrics | 48 | 4 | 1005-1013
Westfall & Young 1993 | Westfall, P. H. and Young, S. S. | Resampling-Based Multiple Testing: Examples and Methods for p-Value Adjustment | book: Wiley, New York | | |
Ge, Dudoit & Speed 2003 | Ge, Y. and Dudoit, S. and Speed, T. P. | Resampling-based multiple testing for microarray data analysis | TEST | 12 | 1 | 1-77
Benjamini & Hochberg 1995 | Benjamini, Y. and Hochberg, Y. | Controlling the false discovery rate: a practical and powerful approach to multiple testing | Journal of the Royal Statistical Society, Series B | 57 | 1 | 289-300
Benjamini & Yekutieli 2001 | Benjamini, Y. and Yekutieli, D. | The control of the false discovery rate in multiple testing under dependency | Annals of Statistics | 29 | 4 | 1165-1188
Cornfield 1956 | Cornfield, J. | A statistical problem arising from retrospective studies | Proceedings of the Third Berkeley Symposium on Mathematical Statistics and Probability | 4 | | 135-148
Gart 1970 | Gart, J. J. | Point and interval estimation of the common odds ratio in the combination of 2 x 2 tables with fixed marginals | Biometrika | 57 | 3 | 471-475
Mehta, Patel & Gray 1985 | Mehta, C. R. and Patel, N. R. and Gray, R. | Computing an exact confidence interval for the common odds ratio in several 2 x 2 contingency tables | Journal of the American Statistical Association | 80 | 392 | 969-973
Baptista & Pike 1977 | Baptista, J. and Pike, M. C. | Algorithm AS 115: exact two-sided confidence limits for the odds ratio in a 2 x 2 table | Applied Statistics | 26 | 2 | 214-220
Woolf 1955 | Woolf, B. | On estimating the relation between blood group and disease | Annals of Human Genetics | 19 | 4 | 251-253
Robins, Breslow & Greenland 1986 | Robins, J. and Breslow, N. and Greenland, S. | Estimators of the Mantel-Haenszel variance consistent in both sparse data and large-strata limiting models | Biometrics | 42 | 2 | 311-323
Greenland & Robins 1985 | Greenland, S. and Robins, J. M. | Estimation of a common effect parameter from sparse follow-up data | Biometrics | 41 | 1 | 55-68
Sato 1989 | Sato, T. | On the variance estimator for the Mantel-Haenszel risk difference | Biometrics | 45 | 4 | 1323-1324
Wilson 1927 | Wilson, E. B. | Probable inference, the law of succession, and statistical inference | Journal of the American Statistical Association | 22 | 158 | 209-212
Newcombe 1998 | Newcombe, R. G. | Interval estimation for the difference between independent proportions: comparison of eleven methods | Statistics in Medicine | 17 | 8 | 873-890
Newcombe 1998 (pairs) | Newcombe, R. G. | Improved confidence intervals for the difference between binomial proportions based on paired data | Statistics in Medicine | 17 | 22 | 2635-2650
Tango 1998 | Tango, T. | Equivalence test and confidence interval for the difference in proportions for the paired-sample design | Statistics in Medicine | 17 | 8 | 891-908
Laupacis et al. 1988 | Laupacis, A. and Sackett, D. L. and Roberts, R. S. | An assessment of clinically useful measures of the consequences of treatment | New England Journal of Medicine | 318 | 26 | 1728-1733
Levin 1953 | Levin, M. L. | The occurrence of lung cancer in man | Acta Unio Internationalis Contra Cancrum | 9 | | 531-541
Altman 1998 | Altman, D. G. | Confidence intervals for the number needed to treat | British Medical Journal | 317 | 7168 | 1309-1312
Miettinen & Nurminen 1985 | Miettinen, O. and Nurminen, M. | Comparative analysis of two rates | Statistics in Medicine | 4 | 2 | 213-226
Katz et al. 1978 | Katz, D. and Baptista, J. and Azen, S. P. and Pike, M. C. | Obtaining confidence intervals for the risk ratio in cohort studies | Biometrics | 34 | 3 | 469-474
Chan & Zhang 1999 | Chan, I. S. F. and Zhang, Z. | Test-based exact confidence intervals for the difference of two binomial proportions | Biometrics | 55 | 4 | 1202-1209
Koopman 1984 | Koopman, P. A. R. | Confidence intervals for the ratio of two binomial proportions | Biometrics | 40 | 2 | 513-517
Cramer 1946 | Cramer, H. | Mathematical Methods of Statistics | book: Princeton University Press, Princeton | | |
Bergsma 2013 | Bergsma, W. | A bias-correction for Cramer's V and Tschuprow's T | Journal of the Korean Statistical Society | 42 | 3 | 323-328
Goodman & Kruskal 1954 | Goodman, L. A. and Kruskal, W. H. | Measures of association for cross classifications | Journal of the American Statistical Association | 49 | 268 | 732-764
Goodman & Kruskal 1963 | Goodman, L. A. and Kruskal, W. H. | Measures of association for cross classifications III: approximate sampling theory | Journal of the American Statistical Association | 58 | 302 | 310-364
Goodman & Kruskal 1972 | Goodman, L. A. and Kruskal, W. H. | Measures of association for cross classifications, IV: simplification of asymptotic variances | Journal of the American Statistical Association | 67 | 338 | 415-421
Brown & Benedetti 1977 | Brown, M. B. and Benedetti, J. K. | Sampling behavior of tests for correlation in two-way contingency tables | Journal of the American Statistical Association | 72 | 358 | 309-315
Kendall 1945 | Kendall, M. G. | The treatment of ties in ranking problems | Biometrika | 33 | 3 | 239-251
Stuart 1953 | Stuart, A. | The estimation and comparison of strengths of association in contingency tables | Biometrika | 40 | 1/2 | 105-110
Somers 1962 | Somers, R. H. | A new asymmetric measure of association for ordinal variables | American Sociological Review | 27 | 6 | 799-811
Theil 1970 | Theil, H. | On the estimation of relationships involving qualitative variables | American Journal of Sociology | 76 | 1 | 103-154
`;
