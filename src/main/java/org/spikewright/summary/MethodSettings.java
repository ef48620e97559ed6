package org.spikewright.summary;

import java.util.List;

/** How results come about, with the published methods, as the Settings sheet shows it. */
final class MethodSettings {
  static final List<Setting> ALL =
      List.of(
          method(
              "Unit of evidence",
              "the flask; its readings are averaged first",
              "replicates of one flask are not independent preparations"),
          method(
              "Line",
              "ordinary least squares on flask means; weighted by the pool's noise "
                  + "function where the method sets weights = \"pool\"",
              "Danzer and Currie, Pure Appl. Chem. 70 (1998) 993; Miller and Miller, "
                  + "Statistics and Chemometrics for Analytical Chemistry, ch. 5"),
          method(
              "Pools",
              "one instrument, analyte, line and design: tonight's series of three "
                  + "flasks or more and those of up to 20 earlier nights; ten or more lend "
                  + "their noise, a smaller pool borrows the relative noise of its "
                  + "instrument",
              "the first summary after the day's close makes and keeps them, later "
                  + "revisions use them as they are; until then they are provisional"),
          method(
              "Noise function",
              "sd² = constant² + (proportional · signal)², fitted robustly to flasks "
                  + "about their lines and to readings within flasks",
              "Thompson, Analyst 113 (1988) 1579; Carroll and Ruppert, Transformation "
                  + "and Weighting in Regression (1988), ch. 3"),
          method(
              "Moderated variance",
              "(d_0·s_0² + ν·s²)/(d_0 + ν) with d_0 + ν degrees of freedom; the prior "
                  + "s_0², d_0 is the pool's, robust to a few bad series",
              "Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3; Phipson, Lee, "
                  + "Majewski, Alexander and Smyth, Ann. Appl. Stat. 10 (2016) 946"),
          method(
              "95 % interval",
              "Fieller's interval of the x-intercept, asymmetric; with the moderated "
                  + "variance where a pool lends, unless the method asks for its own; own "
                  + "and pool both stand on the Series sheet",
              "Fieller, J. R. Stat. Soc. B 16 (1954) 175"),
          method(
              "Expanded uncertainty U",
              "k·u of the whole budget: the fit by the reported interval's variance, "
                  + "and what mappings and configuration say of stock, volumes, masses and "
                  + "blank; k is Student's t for 95 % at the effective degrees of freedom, "
                  + "and U is never less than that of the fit alone",
              "JCGM 100:2008, 5.1.2, 5.2.2 and G.4; Eurachem/CITAC CG 4 (2012), 8.2; "
                  + "what nobody states is not in it"),
          method(
              "Bend",
              "quadratic coefficient, one-sided towards saturation unless the method "
                  + "says either; by the pool's variance of parabolas where it lends",
              "Mandel, The Statistical Analysis of Experimental Data (1964); ISO "
                  + "8466-1; Smyth 2004 as above"),
          method(
              "Largest bias by a bend",
              "the one-sided 95 % bound of the quadratic coefficient, carried to the "
                  + "result; in the budget only where the method sets a limit",
              "Miller and Miller as above"),
          method(
              "Odd flask, odd level",
              "externally studentised (deleted) residual, by the moderated variance "
                  + "where a pool lends, corrected for the number of flasks and levels",
              "Cook and Weisberg, Residuals and Influence in Regression (1982), ch. "
                  + "2; Bonferroni's correction"),
          method(
              "Noisy",
              "the residual variance against the pool's prior, by F(ν, d_0)",
              "Smyth 2004 as above, section 4"),
          method(
              "Suspected slip",
              "simple slips at the bench, each as a shift of the line, all tried " + "together",
              "Cook and Weisberg as above, 2.2; Scheffé, Biometrika 40 (1953) 87"),
          method(
              "Odd slope",
              "the sensitivity on a logarithmic scale against the pool's robust "
                  + "centre and spread",
              "Algorithm A of ISO 13528:2022, annex C"),
          method(
              "Several tests on one series",
              "Holm's procedure at the false-alarm rate of the series over bent, odd "
                  + "flask or level, noisy, suspected slip and odd slope, as many as can be "
                  + "made",
              "Holm, Scand. J. Statist. 6 (1979) 65"),
          method(
              "Tests of the whole night",
              "shared bend, level off and drift: one effect common to a pool's series "
                  + "of tonight, by moderated variances, each at its own rate of false "
                  + "alarms; levels by Holm over their number",
              "Smyth 2004 and Holm 1979 as above; ISO 8466-2 for the form of the bend"),
          method(
              "Detection limit",
              "errors of 5 % of either kind, by the variance of the reported interval",
              "Currie, Pure Appl. Chem. 67 (1995) 1699; ISO 11843-2"),
          method(
              "Electrode",
              "potentials fitted to E_0 + S·log10(amount/volume); interval by profile "
                  + "likelihood; U is t times the standard error of the fit alone, and no "
                  + "pool lends",
              "Bader, J. Chem. Educ. 57 (1980) 703; Gran, Analyst 77 (1952) 661"));

  private MethodSettings() {}

  private static Setting method(String name, String how, String source) {
    return new Setting("Calculation", name, how, source);
  }
}
