// Sources of statistics, of exact laws and of tests, one a line:
// how it is cited | authors | title | journal, or for a book its publisher | volume | number | pages.

export const sourcesOfTests = `
Pearson 1900 | Pearson, K. | On the criterion that a given system of deviations from the probable in the case of a correlated system of variables is such that it can be reasonably supposed to have arisen from random sampling | Philosophical Magazine, Series 5 | 50 | 302 | 157-175
Wilks 1935 | Wilks, S. S. | The likelihood test of independence in contingency tables | Annals of Mathematical Statistics | 6 | 4 | 190-196
Freeman & Halton 1951 | Freeman, G. H. and Halton, J. H. | Note on an exact treatment of contingency, goodness of fit and other problems of significance | Biometrika | 38 | 1/2 | 141-149
Freeman & Tukey 1950 | Freeman, M. F. and Tukey, J. W. | Transformations related to the angular and the square root | Annals of Mathematical Statistics | 21 | 4 | 607-611
Cressie & Read 1984 | Cressie, N. and Read, T. R. C. | Multinomial goodness-of-fit tests | Journal of the Royal Statistical Society, Series B | 46 | 3 | 440-464
Haberman 1973 | Haberman, S. J. | The analysis of residuals in cross-classified tables | Biometrics | 29 | 1 | 205-220
Wald 1943 | Wald, A. | Tests of statistical hypotheses concerning several parameters when the number of observations is large | Transactions of the American Mathematical Society | 54 | 3 | 426-482
Cochran 1954 | Cochran, W. G. | Some methods for strengthening the common chi-square tests | Biometrics | 10 | 4 | 417-451
Armitage 1955 | Armitage, P. | Tests for linear trends in proportions and frequencies | Biometrics | 11 | 3 | 375-386
Mantel 1963 | Mantel, N. | Chi-square tests with one degree of freedom; extensions of the Mantel-Haenszel procedure | Journal of the American Statistical Association | 58 | 303 | 690-700
Bartholomew 1959 | Bartholomew, D. J. | A test of homogeneity for ordered alternatives | Biometrika | 46 | 1/2 | 36-48
Kruskal & Wallis 1952 | Kruskal, W. H. and Wallis, W. A. | Use of ranks in one-criterion variance analysis | Journal of the American Statistical Association | 47 | 260 | 583-621
Fisher 1935 | Fisher, R. A. | The logic of inductive inference | Journal of the Royal Statistical Society | 98 | 1 | 39-82
Irwin 1935 | Irwin, J. O. | Tests of significance for differences between percentages based on small numbers | Metron | 12 | 2 | 83-94
Lancaster 1961 | Lancaster, H. O. | Significance tests in discrete distributions | Journal of the American Statistical Association | 56 | 294 | 223-234
Blaker 2000 | Blaker, H. | Confidence curves and improved exact confidence intervals for discrete distributions | Canadian Journal of Statistics | 28 | 4 | 783-798
Pagano & Tritchler 1983 | Pagano, M. and Tritchler, D. | On obtaining permutation distributions in polynomial time | Journal of the American Statistical Association | 78 | 382 | 435-440
Mehta & Patel 1983 | Mehta, C. R. and Patel, N. R. | A network algorithm for performing Fisher's exact test in r x c contingency tables | Journal of the American Statistical Association | 78 | 382 | 427-434
Barnard 1945 | Barnard, G. A. | A new test for 2 x 2 tables | Nature | 156 | 3954 | 177
Barnard 1947 | Barnard, G. A. | Significance tests for 2 x 2 tables | Biometrika | 34 | 1/2 | 123-138
Boschloo 1970 | Boschloo, R. D. | Raised conditional level of significance for the 2 x 2-table when testing the equality of two probabilities | Statistica Neerlandica | 24 | 1 | 1-9
Suissa & Shuster 1985 | Suissa, S. and Shuster, J. J. | Exact unconditional sample sizes for the 2 x 2 binomial trial | Journal of the Royal Statistical Society, Series A | 148 | 4 | 317-327
Chan 1998 | Chan, I. S. F. | Exact tests of equivalence and efficacy with a non-zero lower bound for comparative studies | Statistics in Medicine | 17 | 12 | 1403-1413
Farrington & Manning 1990 | Farrington, C. P. and Manning, G. | Test statistics and sample size formulae for comparative binomial trials with null hypothesis of non-zero risk difference or non-unity relative risk | Statistics in Medicine | 9 | 12 | 1447-1454
Schuirmann 1987 | Schuirmann, D. J. | A comparison of the two one-sided tests procedure and the power approach for assessing the equivalence of average bioavailability | Journal of Pharmacokinetics and Biopharmaceutics | 15 | 6 | 657-680
Suissa & Shuster 1991 | Suissa, S. and Shuster, J. J. | The 2 x 2 matched-pairs trial: exact unconditional design and analysis | Biometrics | 47 | 2 | 361-372
Berger & Boos 1994 | Berger, R. L. and Boos, D. D. | P values maximized over a confidence set for the nuisance parameter | Journal of the American Statistical Association | 89 | 427 | 1012-1016
Bernstein 1912 | Bernstein, S. N. | Démonstration du théorème de Weierstrass fondée sur le calcul des probabilités | Communications de la Société Mathématique de Kharkov, 2nd series | 13 | 1 | 1-2
de Casteljau 1959 | de Casteljau, P. | Outillages méthodes calcul | book: André Citroën Automobiles, Paris (technical report) | | |
McNemar 1947 | McNemar, Q. | Note on the sampling error of the difference between correlated proportions or percentages | Psychometrika | 12 | 2 | 153-157
Edwards 1948 | Edwards, A. L. | Note on the "correction for continuity" in testing the significance of the difference between correlated proportions | Psychometrika | 13 | 3 | 185-187
Bowker 1948 | Bowker, A. H. | A test for symmetry in contingency tables | Journal of the American Statistical Association | 43 | 244 | 572-574
Stuart 1955 | Stuart, A. | A test for homogeneity of the marginal distributions in a two-way classification | Biometrika | 42 | 3/4 | 412-416
Cohen 1960 | Cohen, J. | A coefficient of agreement for nominal scales | Educational and Psychological Measurement | 20 | 1 | 37-46
Cohen 1968 | Cohen, J. | Weighted kappa: nominal scale agreement with provision for scaled disagreement or partial credit | Psychological Bulletin | 70 | 4 | 213-220
Fleiss, Cohen & Everitt 1969 | Fleiss, J. L. and Cohen, J. and Everitt, B. S. | Large sample standard errors of kappa and weighted kappa | Psychological Bulletin | 72 | 5 | 323-327
Mantel & Haenszel 1959 | Mantel, N. and Haenszel, W. | Statistical aspects of the analysis of data from retrospective studies of disease | Journal of the National Cancer Institute | 22 | 4 | 719-748
van Elteren 1960 | van Elteren, P. H. | On the combination of independent two sample tests of Wilcoxon | Bulletin of the International Statistical Institute | 37 | | 351-361
Landis, Heyman & Koch 1978 | Landis, J. R. and Heyman, E. R. and Koch, G. G. | Average partial association in three-way contingency tables: a review and discussion of alternative tests | International Statistical Review | 46 | 3 | 237-254
Breslow & Day 1980 | Breslow, N. E. and Day, N. E. | Statistical Methods in Cancer Research, Volume 1: The Analysis of Case-Control Studies | book: International Agency for Research on Cancer, Lyon | | |
Tarone 1985 | Tarone, R. E. | On heterogeneity tests based on efficient scores | Biometrika | 72 | 1 | 91-95
Zelen 1971 | Zelen, M. | The analysis of several 2 x 2 contingency tables | Biometrika | 58 | 1 | 129-137
Simpson 1951 | Simpson, E. H. | The interpretation of interaction in contingency tables | Journal of the Royal Statistical Society, Series B | 13 | 2 | 238-241
Goodman 1968 | Goodman, L. A. | The analysis of cross-classified data: independence, quasi-independence, and interactions in contingency tables with or without missing entries | Journal of the American Statistical Association | 63 | 324 | 1091-1131
`;
